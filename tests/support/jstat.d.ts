/** The part of jstat that the reference tests use; the package brings no types. */
declare module 'jstat' {
  export const jStat: {
    studentt: {
      inv: (p: number, dof: number) => number
    }
    models: {
      ols: (
        endogenous: number[],
        exogenous: number[][],
      ) => {
        coef: number[]
        R2: number
        SSE: number
        t: { se: number[]; sigmaHat: number }
      }
    }
  }
}
