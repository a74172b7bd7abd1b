import type { Config } from "tailwindcss";
import plugin from "tailwindcss/plugin";
import { COLOURS, type Colour } from "./components/ui/colours";

const colours: [string, Colour][] = Object.entries(COLOURS);
const variables = (scheme: keyof Colour): Record<string, string> =>
  Object.fromEntries(colours.map(([name, colour]) => [`--${name}`, colour[scheme]]));

const config: Config = {
  content: [],
  theme: {
    extend: {
      colors: Object.fromEntries(colours.map(([name]) => [name, `var(--${name})`])),
      fontFamily: { sans: ["var(--font-text)"], mono: ["var(--font-code)"] },
    },
  },
  plugins: [
    plugin(({ addBase }) => {
      addBase({
        ":root": { "color-scheme": "light dark", ...variables("light") },
        // On screen only: paper is light.
        "@media screen and (prefers-color-scheme: dark)": { ":root": variables("dark") },
      });
    }),
  ],
};
export default config;
