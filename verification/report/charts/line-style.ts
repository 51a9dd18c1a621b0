import type { Colour } from "./palette.ts";

/** How one role is drawn: told apart by dash and width as well as by colour. */
export interface LineStyle {
  readonly colour: Colour;
  readonly width: number;
  /** SVG dash pattern; absent: solid. */
  readonly dash?: string;
}

export const LINE_STYLES = {
  actual: { colour: "blue", width: 1.8 },
  wanted: { colour: "ink", width: 1.4, dash: "6 3" },
  followed: { colour: "vermilion", width: 1.4, dash: "1.5 2.5" },
  measured: { colour: "purple", width: 0.9 },
  command: { colour: "vermilion", width: 1.2, dash: "4 2" },
  input: { colour: "green", width: 1.4, dash: "8 2 2 2" },
  limit: { colour: "ink", width: 1.2, dash: "10 3" },
  soft_limit: { colour: "soft", width: 1, dash: "2 3" },
  context: { colour: "soft", width: 0.8 },
} as const satisfies Record<string, LineStyle>;
export type LineRole = keyof typeof LINE_STYLES;
