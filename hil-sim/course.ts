import type { FixedCourse } from "./drawn-scenario.ts";

/** A course made ready for running through: `before[i]` is the value when point i begins to act. Times in seconds. */
export interface ReadyCourse {
  readonly at: readonly number[];
  readonly over: readonly number[];
  readonly before: readonly number[];
  readonly value: readonly number[];
  /** What `moveCourse` found last. */
  current: number;
  /** The point in force, and the millisecond up to which nothing changes. */
  point: number;
  quietUntil: number;
}

/** An empty course is 0 throughout; before its first point a course has the first point's value. */
export function readyCourse(course: FixedCourse): ReadyCourse {
  const points = [...course].sort((a, b) => a.at - b.at);
  const before: number[] = [];
  for (const [i, point] of points.entries()) {
    before.push(i === 0 ? point.value : reachedBy(points[i - 1], before[i - 1], point.at));
  }
  return {
    at: points.map((point) => point.at),
    over: points.map((point) => point.over),
    before,
    value: points.map((point) => point.value),
    current: points.length === 0 ? 0 : points[0].value,
    point: 0,
    quietUntil: Number.NEGATIVE_INFINITY,
  };
}

/** Value of a course at `time` seconds: linear while a point acts, held after. */
export function courseValue(course: FixedCourse, time: number): number {
  const ready = readyCourse(course);
  moveCourse(ready, time * 1000);
  return ready.current;
}

/** Sets `current` for a time in milliseconds, which must not fall from call to call. */
export function moveCourse(course: ReadyCourse, millisecond: number): void {
  if (millisecond < course.quietUntil) return;
  const time = millisecond / 1000;
  const { at, over, before, value } = course;
  let point = course.point;
  while (point + 1 < at.length && at[point + 1] <= time) point += 1;
  course.point = point;
  if (at.length === 0) return;
  const next = point + 1 < at.length ? at[point + 1] : Number.POSITIVE_INFINITY;
  if (time < at[point]) course.quietUntil = Math.floor(at[point] * 1000);
  else if (time - at[point] >= over[point]) {
    course.current = value[point];
    course.quietUntil = Math.floor(next * 1000);
  } else {
    course.current = before[point] + ((value[point] - before[point]) * (time - at[point])) / over[point];
  }
}

function reachedBy(point: FixedCourse[number], before: number, time: number): number {
  const elapsed = time - point.at;
  return elapsed >= point.over ? point.value : before + ((point.value - before) * elapsed) / point.over;
}
