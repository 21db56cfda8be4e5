/** Ours, after NIST SP 800-63B: length alone counts, nothing is asked about kinds of characters. */
export const PASSWORD_MIN_LENGTH = 10
export const PASSWORD_MAX_LENGTH = 200
export const PASSWORD_RULE = `At least ${PASSWORD_MIN_LENGTH} characters. Three or four unconnected words are easy to keep in mind. Any characters will do.`
