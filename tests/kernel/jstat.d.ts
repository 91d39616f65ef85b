/** The part of jstat's distributions that tests take as reference. */
declare module 'jstat' {
  interface Distribution {
    inv(p: number, ...parameters: number[]): number;
    cdf(x: number, ...parameters: number[]): number;
  }
  const distributions: {
    readonly centralF: Distribution;
    readonly chisquare: Distribution;
    readonly beta: Distribution;
  };
  export default distributions;
}
