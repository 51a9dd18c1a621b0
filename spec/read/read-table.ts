import type { TableSpec } from "../quantity.ts";
import type { TableKind } from "../table/kind.ts";
import { type ListNode, type Node, valueAt } from "../text/node.ts";
import type { Context, Place } from "./context.ts";
import type { Match } from "./match-unit.ts";
import { type Axis, readAxis, refuseKeys } from "./read-axis.ts";
import { readNumbers, readUnitKey } from "./read-numbers.ts";
import { refuseShape } from "./refuse-shape.ts";
import { reportSize } from "./report-size.ts";
import { counted } from "./suggest.ts";

export function readTable(
  node: Node,
  kind: TableKind,
  place: Place,
  context: Context,
): TableSpec | undefined {
  if (node.kind !== "map") return refuseShape(node, "a table", place, context);
  refuseKeys(node, ["rows", "columns", "unit", "values"], place, context);
  const axis = (name: "rows" | "columns"): Axis | undefined =>
    readAxis(valueAt(node, [name]), kind[name], { ...place, name: `\`${name}\``, fix: name }, context);
  const [rows, columns] = [axis("rows"), axis("columns")];
  const match = readUnitKey(node, kind.units, place, context);
  const values = readRows(valueAt(node, ["values"]), match, kind, rows, columns, place, context);
  if (rows === undefined || columns === undefined || values === undefined || match === undefined)
    return undefined;
  return {
    rowsOver: rows.over,
    rows: rows.points,
    rowsUnit: rows.unit,
    columnsOver: columns.over,
    columns: columns.points,
    columnsUnit: columns.unit,
    values,
    unit: match.text,
    at: node.at,
  };
}

function readRows(
  node: Node | undefined,
  match: Match | undefined,
  kind: TableKind,
  rows: Axis | undefined,
  columns: Axis | undefined,
  place: Place,
  context: Context,
): readonly number[] | undefined {
  if (node === undefined) return undefined;
  if (node.kind !== "list") return refuseShape(node, "a list of rows", place, context);
  if (rows !== undefined && node.items.length !== rows.points.length) {
    const says = `\`values\` has ${counted(node.items.length, "row")} for ${counted(rows.points.length, "point")} of \`${rows.over}\``;
    return reportSize(node.at, says, rows, "row", context);
  }
  const read = (node as ListNode).items.map((row, i) =>
    readRow(row, match, kind, columns, { ...place, name: `row ${i + 1}` }, context),
  );
  return read.every((row) => row !== undefined) ? (read as number[][]).flat() : undefined;
}

function readRow(
  node: Node,
  match: Match | undefined,
  kind: TableKind,
  columns: Axis | undefined,
  place: Place,
  context: Context,
): readonly number[] | undefined {
  const row = readNumbers(node, match, kind.limits, place, context);
  if (row === undefined || columns === undefined || row.length === columns.points.length) return row;
  const says = `${place.name} has ${counted(row.length, "number")} for ${counted(columns.points.length, "point")} of \`${columns.over}\``;
  return reportSize(node.at, says, columns, "number", context);
}
