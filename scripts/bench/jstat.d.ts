/** The few functions of jstat that the reference uses; the package has no types. */
declare module "jstat" {
  interface JStat {
    normal: {
      inv(p: number, mean: number, sd: number): number;
      cdf(x: number, mean: number, sd: number): number;
    };
    beta: { inv(p: number, a: number, b: number): number };
    lognormal: { inv(p: number, mu: number, sigma: number): number };
    triangular: { inv(p: number, a: number, b: number, c: number): number };
  }
  const jstat: { jStat: JStat };
  export default jstat;
}
