import type { CurveSpec, LoopSpec, TableSpec } from "../../../spec/index.ts";
import { baseUnit } from "../base-unit.ts";
import { type CalibrationEntry, calibrationEntries } from "../calibration.ts";
import { tableBox } from "../figure.ts";
import { code, type Html, html, name } from "../html.ts";
import { figure, whole } from "../numbers.ts";
import type { ReportContext } from "../report-context.ts";

const words = (text: string): string => text.replaceAll("_", " ");

function line({ at }: CalibrationEntry, spec: LoopSpec): string {
  return at.file === spec.file ? whole(at.line) : `${at.file}:${at.line}`;
}

/** A dotted key that may break after its dots and underscores only. */
function key(path: string): Html {
  return html`<code>${path.split(/(?<=[._])/).map((part) => html`${part}<wbr>`)}</code>`;
}

function numbersTable(entries: readonly CalibrationEntry[], spec: LoopSpec): Html {
  const rows = entries.flatMap((entry) =>
    entry.kind === "number" ? [[key(entry.path), name(entry.written), name(line(entry, spec))]] : [],
  );
  return tableBox(
    { caption: "Numbers, as written or as their default", head: ["key", "value", "line"], rows },
    "numbers",
  );
}

function curveTable(entry: CalibrationEntry, curve: CurveSpec, spec: LoopSpec): Html {
  return tableBox(
    {
      caption: `${entry.path} over ${words(curve.over)}, line ${line(entry, spec)}`,
      head: [`${words(curve.over)}, ${baseUnit(curve.axisUnit)}`, `value, ${baseUnit(curve.unit)}`],
      rows: curve.axis.map((x, i) => [figure(x), figure(curve.values[i])]),
    },
    "values",
  );
}

function mapTable(entry: CalibrationEntry, table: TableSpec, spec: LoopSpec): Html {
  const { rows, columns, values } = table;
  const down = `${words(table.rowsOver)}, ${baseUnit(table.rowsUnit)}`;
  const across = `${words(table.columnsOver)}, ${baseUnit(table.columnsUnit)}`;
  return tableBox(
    {
      caption: `${entry.path}, ${baseUnit(table.unit)}: rows ${down}; columns ${across}; line ${line(entry, spec)}`,
      head: [down, ...columns.map((column) => figure(column))],
      rows: rows.map((row, i) => [
        figure(row),
        ...columns.map((_, j) => figure(values[i * columns.length + j])),
      ]),
    },
    "values",
  );
}

function large(entry: CalibrationEntry, spec: LoopSpec): Html[] {
  if (entry.kind === "curve") return [curveTable(entry, entry.curve, spec)];
  return entry.kind === "table" ? [mapTable(entry, entry.table, spec)] : [];
}

function tables(spec: LoopSpec): Html {
  const entries = calibrationEntries(spec.controller);
  return html`<p>Lines are those of ${code(spec.file)}. Curves and maps stand in the controller's base units, whatever
unit they were written in.</p>
${entries.flatMap((entry) => large(entry, spec))}
${numbersTable(entries, spec)}`;
}

/** Every calibration value with its unit and its line in the spec. */
export function calibrationSection({ spec }: ReportContext): Html {
  return html`<section id="calibration" aria-labelledby="calibration-title">
<h2 id="calibration-title">Calibration</h2>
${spec === undefined ? html`<p>The spec was not given to this report, so its values are not listed.</p>` : tables(spec)}
</section>`;
}
