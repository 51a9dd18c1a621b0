/** Units that a spec may use, by the base unit their values are held in. */
const BASE_UNITS: Readonly<Record<string, string>> = {
  "%": "ratio",
  Pa: "kPa",
  bar: "kPa",
  mbar: "kPa",
  psi: "kPa",
  inHg: "kPa",
  krpm: "rpm",
  Hz: "rpm",
  ms: "s",
  us: "s",
  degC: "K",
  degF: "K",
  cm: "mm",
  m: "mm",
};

/** The unit in which a value of a controller spec is held, from the unit it was written in: `%/ms` gives `ratio/s`. */
export function baseUnit(written: string): string {
  if (written === "") return "1";
  return written.replace(/%|[A-Za-z]+/g, (token) => BASE_UNITS[token] ?? token);
}
