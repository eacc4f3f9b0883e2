/** The part of the library that is used here; it comes without types. */
declare module 'jstat' {
  export const jStat: {
    studentt: { inv(probability: number, degreesOfFreedom: number): number }
  }
}
