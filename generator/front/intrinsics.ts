import type { OperatorName } from "../ir/operators.ts";

/** Functions of `runtime/intrinsics.ts` that are operators of the language. */
const INTRINSICS = {
  min: "minimum",
  max: "maximum",
  clamp: "clamp",
  abs: "absolute",
  sqrt: "squareRoot",
  same: "same",
  isFinite: "isFinite",
  toCount: "toCount",
  toReal: "toReal",
} as const satisfies Record<string, OperatorName>;

export const isIntrinsic = (name: string): name is keyof typeof INTRINSICS => Object.hasOwn(INTRINSICS, name);

export const intrinsicOperator = (name: keyof typeof INTRINSICS): OperatorName => INTRINSICS[name];
