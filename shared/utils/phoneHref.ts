/** A telephone number as people write it, as an address a phone can call. */
export const phoneHref = (phone: string): string => `tel:${phone.replace(/(?!^\+)[^\d*#]/g, '')}`
