import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { courseValue, moveCourse, readyCourse } from "../../hil-sim/course.ts";

describe("a course", () => {
  const course = [
    { at: 0, value: 20, over: 0 },
    { at: 1, value: 100, over: 0.2 },
    { at: 2, value: 0, over: 0 },
  ];

  test.each([
    [0, 20],
    [0.999, 20],
    [1, 20],
    [1.05, 40],
    [1.1, 60],
    [1.2, 100],
    [1.999, 100],
    [2, 0],
    [9, 0],
  ])("at %d s is %d", (time, value) => {
    expect(courseValue(course, time)).toBeCloseTo(value, 9);
  });

  test("that is cut short goes on from where it had come", () => {
    const cut = [...course.slice(0, 2), { at: 1.1, value: 0, over: 0.1 }];
    expect(courseValue(cut, 1.1)).toBeCloseTo(60, 9);
    expect(courseValue(cut, 1.15)).toBeCloseTo(30, 9);
  });

  test("before its first point has that point's value; an empty one is 0", () => {
    expect(courseValue([{ at: 1, value: 7, over: 0 }], 0)).toBe(7);
    expect(courseValue([], 3)).toBe(0);
  });

  test("run through millisecond by millisecond has the value of each instant", () => {
    const point = fc.record({
      at: fc.integer({ min: 0, max: 2000 }).map((ms) => ms / 1000),
      value: fc.double({ min: -10, max: 10, noNaN: true }),
      over: fc.integer({ min: 0, max: 900 }).map((ms) => ms / 1000),
    });
    fc.assert(
      fc.property(fc.uniqueArray(point, { maxLength: 6, selector: ({ at }) => at }), (points) => {
        const ready = readyCourse(points);
        for (let k = 0; k <= 2500; k++) {
          moveCourse(ready, k);
          if (k % 37 === 0) expect(ready.current).toBe(courseValue(points, k / 1000));
        }
      }),
      { numRuns: 60, seed: 5 },
    );
  });
});
