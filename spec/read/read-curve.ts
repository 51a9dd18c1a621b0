import type { CurveSpec } from "../quantity.ts";
import type { CurveKind } from "../table/kind.ts";
import { type Node, valueAt } from "../text/node.ts";
import type { Context, Place } from "./context.ts";
import { isRising, readAxis, refuseKeys } from "./read-axis.ts";
import { readNumbers, readUnitKey } from "./read-numbers.ts";
import { refuseShape } from "./refuse-shape.ts";
import { reportSize } from "./report-size.ts";
import { counted } from "./suggest.ts";

export function readCurve(
  node: Node,
  kind: CurveKind,
  place: Place,
  context: Context,
): CurveSpec | undefined {
  if (node.kind !== "map") return refuseShape(node, "a curve", place, context);
  refuseKeys(node, ["over", "unit", "values"], place, context);
  const axis = readAxis(
    valueAt(node, ["over"]),
    kind.over,
    { ...place, name: "`over`", fix: "over" },
    context,
  );
  const match = readUnitKey(node, kind.units, place, context);
  const valuesNode = valueAt(node, ["values"]);
  const values = readNumbers(valuesNode, match, kind.limits, { ...place, name: "`values`" }, context);
  if (axis === undefined || values === undefined || match === undefined || valuesNode === undefined)
    return undefined;
  if (values.length !== axis.points.length) {
    const says = `\`values\` has ${counted(values.length, "number")} for ${counted(axis.points.length, "point")} of \`${axis.over}\``;
    return reportSize(valuesNode.at, says, axis, "number", context);
  }
  if (kind.increasing && !isRising(values, valuesNode, { ...place, name: "`values`" }, context))
    return undefined;
  return { over: axis.over, axis: axis.points, values, unit: match.text, axisUnit: axis.unit, at: node.at };
}
