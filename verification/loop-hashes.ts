import type { LoopSpec } from "../spec/index.ts";
import { meaningHash } from "./meaning-hash.ts";

/** Hashes of what a spec means: the controller, and all that it is tested with. */
export function loopHashes(loop: LoopSpec): { readonly controller: string; readonly plantAndTests: string } {
  const { controller, plant, scenarios, requirements } = loop;
  return {
    controller: meaningHash(controller),
    plantAndTests: meaningHash({ plant, scenarios, requirements }),
  };
}
