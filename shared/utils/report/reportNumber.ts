/** How a report is called between people: 'Report R-0412'. Numbers run through one organisation. */
export const reportNumber = (number: number): string => `R-${String(number).padStart(4, '0')}`
