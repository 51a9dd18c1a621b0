import { parse } from "csv-parse/sync";

/** Rows of CSV text by column name, all numbers. */
export function rowsOf(text: string): Record<string, number>[] {
  const rows = parse(text, { columns: true, trim: true }) as Record<string, string>[];
  return rows.map((row) =>
    Object.fromEntries(Object.entries(row).map(([name, value]) => [name, Number(value)])),
  );
}
