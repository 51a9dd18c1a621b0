/** An id for the page from a place in the evidence; names are left out, since anything can stand in them. */
export function slug(kind: string, index: number): string {
  return `${kind}-${index + 1}`;
}
