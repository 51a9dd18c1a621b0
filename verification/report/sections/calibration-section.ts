import type { CurveSpec, TableSpec } from "../../../spec/index.ts";
import { type CalibrationEntry, calibrationEntries } from "../calibration.ts";
import { tableBox } from "../figure.ts";
import { code, type Html, html, name } from "../html.ts";
import { figure } from "../numbers.ts";
import type { ReportContext } from "../report-context.ts";

const words = (text: string): string => text.replaceAll("_", " ");

function place({ at }: CalibrationEntry): string {
  return `${at.file}:${at.line}`;
}

function numbersTable(entries: readonly CalibrationEntry[]): Html {
  const rows = entries.flatMap((entry) =>
    entry.kind === "number" ? [[code(entry.path), name(entry.written), name(place(entry))]] : [],
  );
  return tableBox(
    {
      caption: "Numbers, as written in the spec or as its default",
      head: ["key", "value", "written at"],
      rows,
    },
    "numbers",
  );
}

function curveTable(entry: CalibrationEntry, curve: CurveSpec): Html {
  return tableBox(
    {
      caption: `${entry.path}, ${curve.unit}, over ${words(curve.over)}, ${curve.axisUnit} (${place(entry)})`,
      head: [`${words(curve.over)}, ${curve.axisUnit}`, `value, ${curve.unit}`],
      rows: curve.axis.map((x, i) => [figure(x), figure(curve.values[i])]),
    },
    "values",
  );
}

function mapTable(entry: CalibrationEntry, table: TableSpec): Html {
  const { rows, columns, values } = table;
  return tableBox(
    {
      caption:
        `${entry.path}, ${table.unit}: rows ${words(table.rowsOver)}, ${table.rowsUnit}; ` +
        `columns ${words(table.columnsOver)}, ${table.columnsUnit} (${place(entry)})`,
      head: ["", ...columns.map((column) => figure(column))],
      rows: rows.map((row, i) => [
        figure(row),
        ...columns.map((_, j) => figure(values[i * columns.length + j])),
      ]),
    },
    "values",
  );
}

function large(entry: CalibrationEntry): Html[] {
  if (entry.kind === "curve") return [curveTable(entry, entry.curve)];
  return entry.kind === "table" ? [mapTable(entry, entry.table)] : [];
}

/** Every calibration value with its unit and its line in the spec. */
export function calibrationSection(context: ReportContext): Html {
  const entries = context.spec === undefined ? [] : calibrationEntries(context.spec.controller);
  return html`<section id="calibration" aria-labelledby="calibration-title">
<h2 id="calibration-title">Calibration</h2>
${
  entries.length === 0
    ? html`<p>The spec was not given to this report, so its values are not listed.</p>`
    : html`${numbersTable(entries)}${entries.flatMap(large)}`
}</section>`;
}
