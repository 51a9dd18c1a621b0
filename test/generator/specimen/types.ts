// For the editor only: the generator is given the text of runtime/types.ts under this name.
export type * from "../../../runtime/types.ts";
