const WIDTH = 108;

interface Break {
  readonly at: number;
  readonly depth: number;
}

/** Places where a line may be broken: after a comma or an assignment, before an operator; with their bracket depth. */
const breaksOf = (line: string): readonly Break[] => {
  const breaks: Break[] = [];
  let depth = 0;
  for (let i = 0; i < line.length; i++) {
    if ("([{".includes(line[i])) {
      depth += 1;
    } else if (")]}".includes(line[i])) {
      depth -= 1;
    } else if (line[i] === "," && line[i + 1] === " ") {
      breaks.push({ at: i + 2, depth });
    } else if (line.startsWith(" = ", i)) {
      breaks.push({ at: i + 3, depth });
    } else if (/^ (?:[-+*/?:]|&&|\|\|) /.test(line.slice(i, i + 4))) {
      breaks.push({ at: i + 1, depth });
    }
  }
  return breaks;
};

const piecesAt = (line: string, breaks: readonly Break[], depth: number): readonly string[] => {
  const cuts = [0, ...breaks.filter((each) => each.depth === depth).map(({ at }) => at), line.length];
  return cuts.slice(1).map((cut, i) => line.slice(cuts[i], cut));
};

const isAssignment = (line: string, { at }: Break): boolean => line.slice(at - 3, at) === " = ";

/** After its sign when the rest of an assignment then fits on one line, and only there; else anywhere but there. */
const chosenBreaks = (line: string, indent: number): readonly Break[] => {
  const inside = breaksOf(line).filter(({ at }) => at > indent);
  const fitting = inside.filter(
    (each) => isAssignment(line, each) && indent + 4 + line.length - each.at <= WIDTH,
  );
  return fitting.length > 0 ? fitting : inside.filter((each) => !isAssignment(line, each));
};

/** Breaks a line of C or TypeScript that is too wide, at the outermost brackets first; the text stays the same code. */
export const wrap = (line: string): readonly string[] => {
  if (line.length <= WIDTH) {
    return [line];
  }
  const indent = /^ */.exec(line)?.[0] ?? "";
  const inner = `${indent}    `;
  const breaks = chosenBreaks(line, indent.length);
  if (breaks.length === 0) {
    return [line];
  }
  const depth = Math.min(...breaks.map((each) => each.depth));
  const [first, ...rest] = piecesAt(line, breaks, depth);
  const lines = [first];
  for (const piece of rest) {
    const last = lines[lines.length - 1];
    if ((last + piece).trimEnd().length <= WIDTH) {
      lines[lines.length - 1] = last + piece;
    } else {
      lines.push(inner + piece);
    }
  }
  return lines.flatMap((each, i) => (i === 0 && each === line ? [line] : wrap(each.trimEnd())));
};
