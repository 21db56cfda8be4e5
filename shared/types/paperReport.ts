/** Who filled in a form by hand, and on which day. */
export interface PaperOrigin { reporterName: string, filledInOn: string }
