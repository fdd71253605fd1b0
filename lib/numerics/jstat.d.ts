// The part of jstat this library calls; the package carries no types of its own.
declare module "jstat" {
  const jStat: {
    readonly normal: { inv(probability: number, mean: number, standardDeviation: number): number };
    readonly studentt: { inv(probability: number, degreesOfFreedom: number): number };
  };
  export default jStat;
}
