/** A colour in the light and in the dark scheme, as #RRGGBB. */
export interface Colour {
  readonly light: string;
  readonly dark: string;
}

/**
 * The one colour table. `tailwind.config.ts` turns it into CSS variables and utility names; the editor's theme
 * reads it directly. Paper, ink and few colours; each level has a shape as well, so colour never stands alone.
 */
export const COLOURS = {
  paper: { light: "#EFEDE6", dark: "#12171A" },
  sheet: { light: "#FBFAF6", dark: "#1A2125" },
  ink: { light: "#1C2326", dark: "#E7E9E5" },
  grey: { light: "#566066", dark: "#A5B0B5" },
  hairline: { light: "#CCC8BB", dark: "#3A464C" },
  /** Edges of fields and buttons: at least 3:1 against the sheet (WCAG 1.4.11). */
  edge: { light: "#7F7C70", dark: "#74838A" },
  blueprint: { light: "#1D4F7C", dark: "#8FBDE8" },
  "blueprint-wash": { light: "#DCE7F1", dark: "#203547" },
  copper: { light: "#9C4A16", dark: "#E8A06A" },
  "copper-wash": { light: "#F3E2D5", dark: "#3B2819" },
  "copper-solid": { light: "#9C4A16", dark: "#E09658" },
  "copper-pressed": { light: "#7F3A0E", dark: "#F0B07C" },
  "on-copper": { light: "#FFFFFF", dark: "#1A120B" },
  over: { light: "#9B1B1F", dark: "#F2918D" },
  near: { light: "#8A5A00", dark: "#E2B354" },
  within: { light: "#2C6048", dark: "#82C6A4" },
  cannot: { light: "#5A6067", dark: "#A9B2B8" },
} as const satisfies Record<string, Colour>;

export type ColourName = keyof typeof COLOURS;
