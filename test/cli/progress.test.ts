import { expect, test } from "vitest";
import { progressText } from "../../cli/progress.ts";

test("progress names the rate and the time left", () => {
  expect(progressText("verify", "simulations", 400, 1000, 5)).toBe(
    "verify: 400 of 1000 simulations, 80/s, 8 s left",
  );
  expect(progressText("verify", "simulations", 3, 10, 2)).toBe(
    "verify: 3 of 10 simulations, 1.5/s, 5 s left",
  );
});

test("nothing done yet promises no time", () => {
  expect(progressText("verify", "simulations", 0, 10, 2)).toBe("verify: 0 of 10 simulations, 0.0/s");
});
