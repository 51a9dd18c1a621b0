/** The one function used of jstat, which ships no types of its own. */
declare module "jstat" {
  const library: {
    readonly jStat: {
      readonly beta: { inv(probability: number, alpha: number, beta: number): number };
    };
  };
  export default library;
}
