import { expect, test } from "vitest";
import { runCompiled } from "./compiled.ts";

test("a simulated millisecond of plant, sensors and loop allocates nothing", () => {
  // Compiled as shipped: the test runner's module loader keeps calls from being inlined, which boxes every number.
  // A single boxed number would be 16 bytes; the loop's figure includes what a run sets up, over its 20 000 ms.
  const bytes = runCompiled("heap-program.ts") as { plant: number; sensors: number; loop: number };
  expect(bytes.plant).toBeLessThan(4);
  expect(bytes.sensors).toBeLessThan(4);
  expect(bytes.loop).toBeLessThan(4);
});
