/**
 * Colours by role, as CSS variables of the page. Hues after Okabe and Ito's set for colour-blind readers (from
 * memory), darkened or lightened until each line has at least 3:1 and each text 4.5:1 on its paper. No meaning
 * hangs on colour alone: every line also has its own dash, and every verdict its word and shape.
 */
export const PALETTE = {
  paper: { light: "#ffffff", dark: "#15181b" },
  panel: { light: "#f5f6f7", dark: "#1d2125" },
  ink: { light: "#1b1f23", dark: "#e4e7ea" },
  soft: { light: "#525c66", dark: "#a9b3bc" },
  rule: { light: "#c8ced4", dark: "#3d454d" },
  grid: { light: "#e3e7ea", dark: "#2a3036" },
  accent: { light: "#0b5394", dark: "#7fbdf2" },
  blue: { light: "#0072b2", dark: "#56b4e9" },
  vermilion: { light: "#c44e00", dark: "#f08a4b" },
  green: { light: "#007a5a", dark: "#2fc39a" },
  purple: { light: "#9a4a80", dark: "#dd9cc4" },
} as const;

export type Colour = keyof typeof PALETTE;
export type Scheme = "light" | "dark";

export function colour(name: Colour): string {
  return `var(--${name})`;
}

/** The variables of one scheme as CSS declarations. */
export function declarations(scheme: Scheme): string {
  return Object.entries(PALETTE)
    .map(([name, value]) => `--${name}:${value[scheme]};`)
    .join("");
}

/** Variables replaced by fixed light colours, for pictures that leave the page. */
export function withFixedColours(svg: string): string {
  return svg.replace(/var\(--([a-z]+)\)/g, (text, name: string) => {
    return name in PALETTE ? PALETTE[name as Colour].light : text;
  });
}
