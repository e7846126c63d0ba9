/** The few functions of jstat that the tests compare with; the package has no types of its own. */
declare module "jstat" {
  interface Distribution {
    cdf(x: number, ...degreesOfFreedom: number[]): number;
  }
  const library: { jStat: Record<"chisquare" | "centralF" | "studentt", Distribution> };
  export default library;
}
