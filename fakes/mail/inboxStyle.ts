/** The product's own tokens, in both schemes; the face comes from the same npm package the product ships. */
export const inboxStyle = `
@font-face { font-family: 'Nunito Sans'; src: url('/font/400') format('woff2'); font-weight: 400 }
@font-face { font-family: 'Nunito Sans'; src: url('/font/800') format('woff2'); font-weight: 800 }
:root { color-scheme: light dark; --paper: #FAF6EE; --plaster: #F0E9DC; --rule: #D3C8B4; --ink: #1E282D; --graphite: #4D5B63; --verdigris: #17635A; --madder: #97291F }
@media (prefers-color-scheme: dark) { :root { --paper: #14191C; --plaster: #1D2428; --rule: #38434A; --ink: #ECE6DA; --graphite: #A9B4BA; --verdigris: #7CC7BA; --madder: #F2A093 } }
* { box-sizing: border-box }
body { margin: 0; background: var(--paper); color: var(--ink); font: 400 16px/1.5 'Nunito Sans', sans-serif; font-variant-numeric: tabular-nums }
main { max-width: 60rem; margin: 0 auto; padding: 24px 16px 64px }
h1 { font-size: 28px; line-height: 1.2; margin: 0 0 8px } h2 { font-size: 18px; margin: 32px 0 8px }
p { margin: 0 0 16px } .quiet { color: var(--graphite) } .alarm { color: var(--madder); font-weight: 800 }
a { color: var(--verdigris) } :focus-visible { outline: 3px solid var(--verdigris); outline-offset: 2px }
ol.mails { list-style: none; margin: 24px 0; padding: 0; border-top: 2px solid var(--ink) }
ol.mails li { border-bottom: 1px solid var(--rule) }
ol.mails a { display: grid; grid-template-columns: minmax(0, 14rem) minmax(0, 1fr) auto; gap: 4px 16px; padding: 12px 0; min-height: 44px; color: inherit; text-decoration: none; overflow-wrap: anywhere }
ol.mails a:hover strong { text-decoration: underline }
time { white-space: nowrap; color: var(--graphite) }
@media (max-width: 640px) { ol.mails a { grid-template-columns: 1fr } }
nav a, .button { display: inline-flex; align-items: center; min-height: 44px; margin-right: 16px }
dl { display: grid; grid-template-columns: 6rem minmax(0, 1fr); gap: 4px 16px; margin: 0 0 16px; padding: 12px 0; border-top: 2px solid var(--ink); border-bottom: 1px solid var(--rule) }
dt { color: var(--graphite) } dd { margin: 0; overflow-wrap: anywhere }
iframe { width: 100%; height: 60vh; min-height: 480px; border: 1px solid var(--rule); background: #fff; border-radius: 2px }
pre { white-space: pre-wrap; overflow-wrap: anywhere; background: var(--plaster); padding: 16px; border-radius: 2px; font: inherit; margin: 0 }
summary { min-height: 44px; display: flex; align-items: center; cursor: pointer; color: var(--verdigris) }
`
