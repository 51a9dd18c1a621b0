import { expect, test } from "vitest";
import { csvNumber, traceCsv } from "../../cli/trace-csv.ts";
import { newTrace } from "../../hil-sim/index.ts";

// RFC 4180: lines end in CRLF, the header is the first line, every line has the same number of fields.
test("a trace becomes a header with units and one line per sample", () => {
  const trace = newTrace(["boost_pressure", "turbo_speed"], 1);
  trace.length = 2;
  trace.signals.boost_pressure?.set([101.325, 1 / 3]);
  trace.signals.turbo_speed?.set([1e5, 100001]);
  expect(traceCsv(trace)).toBe(
    "time_s,boost_pressure_kpa,turbo_speed_rpm\r\n0,101.325,100000\r\n0.001,0.333333333,100001\r\n",
  );
});

test("nine digits tell neighbouring float32 values apart", () => {
  const one = Math.fround(0.1);
  const next = one + 2 ** -27;
  expect(csvNumber(one)).not.toBe(csvNumber(next));
  expect(Math.fround(Number(csvNumber(one)))).toBe(one);
  expect(Math.fround(Number(csvNumber(next)))).toBe(next);
});
