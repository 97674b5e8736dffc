/** The one part of jstat that is used here; the package brings no types of its own. */
declare module 'jstat' {
  const jStat: {
    readonly normal: {
      /** Standard deviations below which a share `p` of a normal distribution lies. */
      inv(p: number, mean: number, standardDeviation: number): number;
    };
  };
  export default jStat;
}
