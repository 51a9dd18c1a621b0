/** True for a relative path that stays inside its folder on every system: no drive, no `..`, no backslash. */
export function isInside(path: string): boolean {
  if (path === "" || /[\\:\p{Cc}]/u.test(path) || path.startsWith("/") || path.startsWith("~")) return false;
  return !path.split("/").includes("..");
}
