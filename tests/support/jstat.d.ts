/** What the tests ask of the statistics library, which brings no types. */
declare module 'jstat' {
  export const jStat: {
    normal: { inv: (p: number, mean: number, sd: number) => number, cdf: (x: number, mean: number, sd: number) => number }
    studentt: { inv: (p: number, degreesOfFreedom: number) => number }
  }
}
declare module 'ml-regression-theil-sen' {
  export class TheilSenRegression {
    constructor(x: number[], y: number[])
    slope: number
    intercept: number
  }
}
