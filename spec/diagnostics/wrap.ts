/** Breaks text into lines of at most `width`; the first line starts at `used`, the others after `indent`. Words stay whole. */
export function wrap(text: string, width: number, used: number, indent: string): string {
  const lines: string[] = [];
  let line = "";
  let room = width - used;
  for (const word of text.split(" ")) {
    const longer = line === "" ? word : `${line} ${word}`;
    if (longer.length <= room || line === "") line = longer;
    else {
      lines.push(line);
      line = word;
      room = width - indent.length;
    }
  }
  return [...lines, line].join(`\n${indent}`);
}
