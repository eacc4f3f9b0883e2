/** The part of the library that is used here; it comes without types. */
declare module 'jstat' {
  const library: {
    jStat: {
      studentt: { inv(probability: number, degreesOfFreedom: number): number }
    }
  }
  export default library
}
