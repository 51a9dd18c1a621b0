/** Version of the generator, for the manifest; the package's own. */
export const GENERATOR_VERSION = "0.1.0";
