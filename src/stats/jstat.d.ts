/** The few functions of jstat that are used; it ships no types of its own. */
declare module 'jstat' {
  interface Continuous<Parameters extends readonly number[]> {
    inv(lower: number, ...parameters: Parameters): number;
  }
  interface JStat {
    ibeta(x: number, a: number, b: number): number;
    lowRegGamma(a: number, x: number): number;
    readonly normal: Continuous<[mean: number, deviation: number]>;
    readonly studentt: Continuous<[df: number]>;
    readonly chisquare: Continuous<[df: number]>;
    readonly centralF: Continuous<[numeratorDf: number, denominatorDf: number]>;
    readonly beta: Continuous<[a: number, b: number]>;
    readonly hypgeom: { pdf(count: number, total: number, marked: number, drawn: number): number };
  }
  const library: { readonly jStat: JStat };
  export default library;
}
