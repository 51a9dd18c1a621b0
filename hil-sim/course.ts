import type { FixedCourse } from "./drawn-scenario.ts";

/** A course made ready for reading: `before[i]` is the value when point i begins to act. */
export interface ReadyCourse {
  readonly at: readonly number[];
  readonly over: readonly number[];
  readonly before: readonly number[];
  readonly value: readonly number[];
}

/** An empty course is 0 throughout; before its first point a course has the first point's value. */
export function readyCourse(course: FixedCourse): ReadyCourse {
  const points = [...course].sort((a, b) => a.at - b.at);
  const ready = {
    at: [] as number[],
    over: [] as number[],
    before: [] as number[],
    value: [] as number[],
  };
  for (const point of points) {
    ready.before.push(ready.at.length === 0 ? point.value : courseValue(ready, point.at));
    ready.at.push(point.at);
    ready.over.push(point.over);
    ready.value.push(point.value);
  }
  return ready;
}

/** Value at `time` seconds: linear while a point acts, held after. */
export function courseValue(course: ReadyCourse, time: number): number {
  let i = course.at.length - 1;
  while (i > 0 && course.at[i] > time) i -= 1;
  if (i < 0) return 0;
  const elapsed = time - course.at[i];
  if (elapsed >= course.over[i]) return course.value[i];
  if (elapsed <= 0) return course.before[i];
  return course.before[i] + ((course.value[i] - course.before[i]) * elapsed) / course.over[i];
}
