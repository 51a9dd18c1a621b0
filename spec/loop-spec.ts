import type { ControllerSpec } from "./controller-spec.ts";
import type { PlantSpec } from "./plant-spec.ts";
import type { RequirementSpec } from "./requirement-spec.ts";
import type { ScenarioSpec } from "./scenario-spec.ts";

/** The one source: everything the generator, the plant and the verification need, checked and in base units. */
export interface LoopSpec {
  /** File name as given by the caller. */
  readonly file: string;
  readonly controller: ControllerSpec;
  readonly plant?: PlantSpec;
  /** Path of the plant file as written, if it is not inline. */
  readonly plantFile?: string;
  readonly scenarios: readonly ScenarioSpec[];
  readonly requirements: readonly RequirementSpec[];
}
