/** A file as text, with the name the caller knows it by. */
export interface Source {
  readonly file: string;
  readonly text: string;
}

/** Opens a file beside the spec by its relative path; undefined when there is none. */
export type OpenNeighbour = (path: string) => Source | undefined;
