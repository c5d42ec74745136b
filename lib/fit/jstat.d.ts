/** The part of jstat used here; the package ships no types. */
declare module 'jstat' {
  interface JStat {
    studentt: { inv(probability: number, degreesOfFreedom: number): number };
    chisquare: { inv(probability: number, degreesOfFreedom: number): number };
    normal: {
      inv(probability: number, mean: number, sd: number): number;
      cdf(x: number, mean: number, sd: number): number;
    };
  }
  const jStat: JStat;
  export = jStat;
}
