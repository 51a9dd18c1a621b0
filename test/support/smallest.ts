import { readFileSync } from "node:fs";
import { join } from "node:path";
import { ROOT } from "./run-cli.ts";

export const SMALLEST = "examples/01-smallest/smallest.yaml";
export const SKARN24 = "examples/skarn24/skarn24.yaml";
export const SKARN24_PLANT = "examples/skarn24/skarn24.plant.yaml";

export const smallestText = (): string => readFileSync(join(ROOT, SMALLEST), "utf8");
