import type { Report } from "../diagnostics/report.ts";
import type { PlantSpec } from "../plant-spec.ts";
import { RADIANS_PER_SECOND_PER_RPM } from "../quantities/rpm.ts";
import type { HoledLoop } from "../read-loop-spec.ts";
import type { Free } from "../scenario-spec.ts";
import type { Span } from "../span.ts";
import { type Controller, short, writtenAt } from "./rule.ts";

type Scenario = NonNullable<NonNullable<HoledLoop["scenarios"]>[number]["value"]>;
type Course = Extract<Scenario["accelerator"], readonly unknown[]>;
interface Point {
  readonly at: Free | undefined;
  readonly value: Free | undefined;
  readonly over: Free | undefined;
  readonly span: Span;
}

/** Rules about one scenario. */
export function checkScenario(
  scenario: Scenario,
  controller: Controller | undefined,
  plant: PlantSpec | undefined,
  report: Report,
): void {
  for (const key of ["engineSpeed", "accelerator", "target"] as const) {
    const read = scenario[key];
    if (Array.isArray(read)) checkCourse(read as Course, scenario, key, report);
  }
  checkCeilings(scenario, report);
  if (controller?.target !== undefined) checkPosedTarget(scenario, controller.target, report);
  if (plant !== undefined) checkValidity(scenario, plant, report);
}

const STARTS = {
  engineSpeed: "{ at: 0 s, value: 4000 rpm }",
  accelerator: "{ at: 0 s, value: 20 % }",
  target: "{ at: 0 s, value: 160 kPa abs }",
} as const;
const NAMES = { engineSpeed: "engine_speed", accelerator: "accelerator", target: "target" } as const;

function checkCourse(course: Course, scenario: Scenario, key: keyof typeof NAMES, report: Report): void {
  const points = course.filter(
    (point): point is NonNullable<typeof point> => point !== undefined,
  ) as readonly Point[];
  const [first] = points;
  const name = NAMES[key];
  if (first === undefined || (first.at !== undefined && first.at.high > 0))
    report({
      code: "course-without-start",
      at: first?.at?.at ?? scenario.places[name],
      message: `the course of \`${name}\` does not say where it starts`,
      label: "the first point must be at 0 s",
      fix: STARTS[key],
    });
  const late = points.findIndex(({ at }, i) => i > 0 && isBefore(at, points[i - 1]));
  if (late === -1) return;
  report({
    code: "course-out-of-order",
    at: points[late].at?.at ?? points[late].span,
    message: `a point of \`${name}\` may come before the one above it has finished`,
    label: "must not start before the point above has got there",
    because: [{ at: points[late - 1].at?.at ?? points[late - 1].span, message: "the point above" }],
    fix: "sort the points by time, and keep free times apart",
  });
}

const isBefore = (at: Free | undefined, previous: Point): boolean =>
  at !== undefined &&
  previous.at !== undefined &&
  at.low < previous.at.high + (previous.over?.high ?? 0) - 1e-12;

function checkCeilings(scenario: Scenario, report: Report): void {
  const at = writtenAt(scenario, "ceilings");
  if (scenario.ceilings !== "off" || at === undefined || writtenAt(scenario, "target") !== undefined) return;
  report({
    code: "no-effect",
    at,
    message: "`ceilings: off` has no effect without `target`",
    fix: "add `target`, or remove `ceilings`",
  });
}

/** Standard atmosphere at sea level, ISO 2533; kPa. A pressure ratio allows no more than its multiple. */
const SEA_LEVEL_KPA = 101.325;

/** A posed target that the controller cuts tests something else than it says. */
function checkPosedTarget(
  scenario: Scenario,
  { ceiling, pressureRatioCeiling }: NonNullable<Controller["target"]>,
  report: Report,
): void {
  if (scenario.ceilings === "off") return;
  const posed = valuesOf(scenario.target);
  const ceilings = [
    { quantity: ceiling, named: "ceiling", most: ceiling?.value },
    {
      quantity: pressureRatioCeiling,
      named: "pressure ratio ceiling",
      most: pressureRatioCeiling && pressureRatioCeiling.value * SEA_LEVEL_KPA,
    },
  ];
  for (const { quantity, named, most } of ceilings) {
    const above = posed.find(({ high }) => most !== undefined && high > most * (1 + 1e-9));
    if (quantity === undefined || most === undefined || above === undefined) continue;
    report({
      code: "posed-target-above-ceiling",
      at: above.at,
      message: `the scenario poses a target of up to ${short(above.high)} kPa abs, which the ${named} of ${quantity.written} cuts`,
      label: `at most ${short(most)} kPa abs`,
      because: [{ at: quantity.at, message: "the ceiling" }],
      fix: "ceilings: off",
    });
    return;
  }
}

/** Values of a held signal or of a course. */
function valuesOf(read: Scenario["target"]): readonly Free[] {
  if (read === undefined) return [];
  if (Array.isArray(read)) return (read as readonly Point[]).flatMap((point) => point?.value ?? []);
  return "low" in read ? [read] : [];
}

/** Engine speeds of a scenario: every value it can take. */
function engineSpeeds(read: Scenario["engineSpeed"]): readonly Free[] {
  if (read === undefined) return [];
  if (Array.isArray(read)) return (read as readonly Point[]).flatMap((point) => point?.value ?? []);
  if ("vehicleFrom" in read) return read.vehicleFrom === undefined ? [] : [read.vehicleFrom];
  return "low" in read ? [read] : [];
}

function checkValidity(scenario: Scenario, plant: PlantSpec, report: Report): void {
  const [low, high] = plant.validity.engineSpeed.map((speed) => speed / RADIANS_PER_SECOND_PER_RPM);
  const outside = engineSpeeds(scenario.engineSpeed).find(
    (speed) => speed.low < low * (1 - 1e-9) || speed.high > high * (1 + 1e-9),
  );
  if (outside === undefined) return;
  const at = plant.places.get("validity.engine_speed");
  report({
    code: "outside-validity",
    at: outside.at,
    message: "the scenario leaves the engine speeds the plant is believed at",
    label: `${short(low)} rpm to ${short(high)} rpm`,
    ...(at === undefined ? {} : { because: [{ at, message: "the plant's validity" }] }),
    fix: `engine_speed: between ${short(low)} rpm and ${short(high)} rpm`,
  });
}
