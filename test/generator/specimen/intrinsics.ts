// For the editor only: the generator is given the text of runtime/intrinsics.ts under this name.
export { abs, clamp, isFinite, max, min, same, sqrt, toCount, toReal } from "../../../runtime/intrinsics.ts";
