const currencyFormats = new Map<string, Intl.NumberFormat>()

/** Kept, because making one takes a hundred times as long as using it. */
function currencyFormat(currency: string): Intl.NumberFormat {
  const kept = currencyFormats.get(currency) ?? new Intl.NumberFormat('en-US', { style: 'currency', currency })
  currencyFormats.set(currency, kept)
  return kept
}

/** Money is kept as whole cents; the currency is the organisation's. */
export const formatCents = (cents: number, currency = 'USD'): string =>
  currencyFormat(currency).format(cents / 100)

/** What a person typed as an amount, in whole cents; null stays null, what is no number stays NaN for the schema to refuse. */
export const centsFromAmount = (amount: number | null): number | null => amount === null ? null : Math.round(amount * 100)

export const amountFromCents = (cents: number | null): number | null => cents === null ? null : cents / 100
