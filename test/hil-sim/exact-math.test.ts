import { describe, expect, test } from "vitest";
import { exponential, naturalLog, powerOf, standardPressure } from "../../hil-sim/exact-math.ts";

/** Largest value of `error` over a sweep of `n` points. */
function worst(low: number, high: number, n: number, error: (x: number) => number): number {
  let most = 0;
  for (let i = 0; i <= n; i++) {
    const found = error(low + ((high - low) * i) / n);
    if (!(found <= most)) most = found;
  }
  return most;
}

// Reference: the platform's Math, itself within one unit in the last place.
describe("the stated errors hold over a sweep", () => {
  test("of the logarithm", () => {
    expect(worst(0.01, 100, 200_000, (x) => Math.abs(naturalLog(x) - Math.log(x)))).toBeLessThan(4e-15);
  });

  test("of the exponential", () => {
    expect(worst(-20, 20, 200_000, (x) => Math.abs(exponential(x) / Math.exp(x) - 1))).toBeLessThan(2e-15);
  });

  test("of the power", () => {
    expect(worst(0.3, 1.2, 200_000, (x) => Math.abs(powerOf(x, 5.2559) / x ** 5.2559 - 1))).toBeLessThan(
      1e-14,
    );
  });

  test("of the standard pressure", () => {
    const direct = (h: number) => 101325 * (1 - 2.25577e-5 * h) ** 5.2559;
    expect(worst(-1000, 11000, 50_000, (h) => Math.abs(standardPressure(h) / direct(h) - 1))).toBeLessThan(
      1e-14,
    );
  });
});

test("the logarithm of nothing is not a number", () => {
  expect(naturalLog(0)).toBe(Number.NaN);
  expect(naturalLog(-1)).toBe(Number.NaN);
  expect(exponential(Number.NaN)).toBe(Number.NaN);
});

// Source: ICAO 7488/2 and U.S. Standard Atmosphere 1976 constants, geopotential altitude, recomputed; 1000 m also in
// Mechanical Engineers' Handbook (Kutz), vol. 4, table 6 (0.8988 bar, geometric). The closed form rounds the
// constants, so it is good for 3 Pa up to 4 km.
test.each([
  [0, 101325.0],
  [500, 95460.84],
  [1000, 89874.57],
  [1500, 84556.01],
  [2000, 79495.22],
  [3000, 70108.54],
  [4000, 61640.23],
])("the standard atmosphere at %d m has %d Pa", (altitude, pascal) => {
  expect(Math.abs(standardPressure(altitude) - pascal)).toBeLessThan(3);
});
