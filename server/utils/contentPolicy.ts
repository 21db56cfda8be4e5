/** Only scripts that this answer names may run. Charts and Vue's style bindings need inline styles, scripts do not. */
export const contentPolicy = (nonce: string) => [
  'default-src \'none\'',
  `script-src 'self' 'nonce-${nonce}'`,
  'style-src \'self\' \'unsafe-inline\'',
  'img-src \'self\' blob: data:',
  'font-src \'self\'',
  'connect-src \'self\'',
  'manifest-src \'self\'',
  'worker-src \'self\' blob:',
  'form-action \'self\'',
  'base-uri \'none\'',
  'frame-ancestors \'none\'',
].join('; ')
