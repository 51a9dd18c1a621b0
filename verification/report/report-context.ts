import type { LoopSpec } from "../../spec/index.ts";

/** One file of the generated code. */
export interface GeneratedFile {
  readonly path: string;
  readonly bytes: number;
  /** SHA-256, hex. */
  readonly sha256: string;
}

/** Forms of the controller that were stepped side by side with the same inputs. */
export interface Agreement {
  /** `steps`: compared with the reference; `differing`: steps with an output or state of other bits. */
  readonly targets: readonly { readonly name: string; readonly steps: number; readonly differing: number }[];
  readonly notRun: readonly { readonly name: string; readonly why: string }[];
}

/** What the report shows beside the evidence; each part may be missing, and the report then says so. */
export interface ReportContext {
  /** For the calibration table. */
  readonly spec?: LoopSpec;
  readonly files?: readonly GeneratedFile[];
  readonly agreement?: Agreement;
}
