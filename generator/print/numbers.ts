import type { Precision } from "../lowered.ts";

/** Shortest decimal that gives the value back in its precision: 0.1 for the float nearest to 0.1. */
export const shortestDecimal = (value: number, precision: Precision): string => {
  if (Object.is(value, -0) || precision === "float64") {
    return Object.is(value, -0) ? "-0" : String(value);
  }
  for (let digits = 1; digits < 9; digits++) {
    const text = value.toPrecision(digits);
    if (Object.is(Math.fround(Number(text)), value)) {
      return String(Number(text));
    }
  }
  return String(Number(value.toPrecision(9)));
};

/** Few enough binary places that the decimal is the value itself, not a neighbour that rounds to it. */
export const isExactDecimal = (value: number): boolean =>
  Number.isInteger(value * 64) && Math.abs(value) < 2 ** 24;

/** Hexadecimal form, exact by C99 6.4.4.2 whatever the compiler's decimal rounding. Finite values only. */
export const hexFloat = (value: number): string => {
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, value);
  const bits = view.getBigUint64(0);
  const sign = bits >> 63n === 1n ? "-" : "";
  const exponent = Number((bits >> 52n) & 0x7ffn);
  const fraction = (bits & 0xfffffffffffffn).toString(16).padStart(13, "0").replace(/0+$/, "");
  const point = fraction === "" ? "" : `.${fraction}`;
  if (exponent === 0) {
    return fraction === "" ? `${sign}0x0p+0` : `${sign}0x0${point}p-1022`;
  }
  const power = exponent - 1023;
  return `${sign}0x1${point}p${power < 0 ? "" : "+"}${power}`;
};
