import { readdirSync } from "node:fs";
import { createTypeScriptImportResolver } from "eslint-import-resolver-typescript";
import nextVitals from "eslint-config-next/core-web-vitals";
import { importX } from "eslint-plugin-import-x";
import tseslint from "typescript-eslint";

const CORE = [
  "lib/domain",
  "lib/parsers",
  "lib/keytable",
  "lib/diff",
  "lib/physics",
  "lib/rules",
  "lib/solve",
  "lib/policies",
  "lib/review",
];

/** layer -> everything it may import, as paths; anything else under the repository is an error. No exceptions. */
const MAY_IMPORT = {
  "lib/domain": ["node_modules/zod"],
  "lib/parsers": ["lib/domain", "node_modules/jsonc-parser", "node_modules/yaml"],
  "lib/keytable": ["lib/domain", "lib/parsers"],
  "lib/diff": ["lib/domain", "lib/parsers", "node_modules/diff", "node_modules/node-diff3"],
  "lib/physics": ["lib/domain"],
  "lib/rules": ["lib/domain", "lib/physics"],
  "lib/solve": ["lib/domain", "lib/physics", "lib/rules"],
  "lib/policies": ["lib/domain"],
  "lib/review": [
    "lib/domain",
    "lib/parsers",
    "lib/keytable",
    "lib/diff",
    "lib/physics",
    "lib/rules",
    "lib/solve",
  ],
  "lib/schemas": ["lib/domain", "node_modules/zod"],
  "lib/server": ["lib/domain", "node_modules"],
  models: ["lib/domain", "lib/server", "node_modules"],
  migrations: ["node_modules"],
  "lib/services": [...CORE, "lib/schemas", "lib/server", "models", "node_modules"],
  "lib/http": [...CORE, "lib/schemas", "lib/server", "lib/services", "node_modules"],
  "lib/jobs": [...CORE, "lib/schemas", "lib/server", "lib/services", "node_modules"],
  components: [...CORE, "lib/schemas", "node_modules"],
  app: [
    ...CORE,
    "lib/schemas",
    "lib/services",
    "lib/server",
    "lib/http",
    "lib/jobs",
    "components",
    "node_modules",
  ],
};
for (const { name } of readdirSync("lib", { withFileTypes: true }).filter((entry) => entry.isDirectory()))
  if (!(`lib/${name}` in MAY_IMPORT)) throw new Error(`lib/${name} has no layer in eslint.config.mjs`);

const zones = Object.entries(MAY_IMPORT).map(([layer, allowed]) => ({
  target: `./${layer}`,
  from: ".",
  except: [layer, ...allowed].map((path) => `./${path}`),
  message: `${layer}/ may import only: ${allowed.join(", ") || "itself"}.`,
}));

const ban = (names, message) => ({ patterns: [{ group: names, message }] });
const longest = (max) => ["error", { max, skipBlankLines: true, skipComments: true }];

export default tseslint.config(
  {
    ignores: [
      "node_modules",
      ".next*/**",
      "next-env.d.ts",
      ".keepstep/**",
      "public/**",
      "coverage/**",
      "test-results/**",
    ],
  },
  ...nextVitals,
  {
    files: ["**/*.{ts,tsx}"],
    languageOptions: { parser: tseslint.parser },
    plugins: { "import-x": importX, "@typescript-eslint": tseslint.plugin },
    settings: {
      ...importX.flatConfigs.typescript.settings,
      "import-x/resolver-next": [createTypeScriptImportResolver()],
    },
    rules: {
      "import-x/no-restricted-paths": ["error", { zones }],
      "import-x/no-cycle": "error",
      "import/no-anonymous-default-export": "off",
      "@typescript-eslint/no-explicit-any": "error",
      "@typescript-eslint/no-non-null-assertion": "error",
      "@typescript-eslint/consistent-type-imports": "error",
      "no-console": "error",
      eqeqeq: ["error", "always"],
    },
  },
  {
    files: CORE.map((path) => `${path}/**/*.ts`),
    rules: {
      "import-x/no-nodejs-modules": "error",
      "max-lines-per-function": longest(60),
      "no-restricted-globals": [
        "error",
        ...[
          "process",
          "globalThis",
          "fetch",
          "console",
          "window",
          "document",
          "self",
          "Buffer",
          "setTimeout",
          "setInterval",
        ],
        ...["crypto", "performance", "localStorage"],
      ],
      "no-restricted-properties": [
        "error",
        { object: "Date", property: "now" },
        { object: "Math", property: "random" },
      ],
      "no-restricted-syntax": [
        "error",
        { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: "Pass the clock in." },
        { selector: ":function[async=true]", message: "The core is synchronous." },
      ],
    },
  },
  {
    files: ["components/**/*.{ts,tsx}"],
    rules: {
      "max-lines-per-function": longest(120),
      "no-restricted-imports": [
        "error",
        ban(["sequelize", "pg", "pg-*", "nodemailer", "server-only"], "Call the API."),
      ],
    },
  },
  {
    files: ["app/**/*.{ts,tsx}"],
    rules: {
      "no-restricted-imports": ["error", ban(["sequelize", "pg", "pg-*", "nodemailer"], "Call a service.")],
    },
  },
  {
    files: ["app/(desk)/**/page.tsx"],
    rules: {
      "no-restricted-imports": ["error", ban(["sequelize", "pg", "pg-*", "nodemailer"], "Call a service.")],
      "no-restricted-syntax": [
        "error",
        {
          selector: "Program:not(:has(CallExpression[callee.name='pageActor']))",
          message: "A page asks lib/policies: pageActor(action).",
        },
      ],
    },
  },
  {
    files: ["app/api/v1/**/route.ts"],
    rules: {
      "no-restricted-imports": ["error", ban(["sequelize", "pg", "pg-*", "nodemailer"], "Call a service.")],
      "no-restricted-syntax": [
        "error",
        {
          selector: "Program:not(:has(CallExpression[callee.name='handle']))",
          message: "A route answers through handle(operation, …).",
        },
      ],
    },
  },
  {
    files: ["lib/services/**/*.ts", "models/**/*.ts"],
    rules: {
      "max-lines-per-function": longest(60),
      "no-restricted-syntax": [
        "error",
        {
          selector: "Program:not(:has(ImportDeclaration[source.value='server-only']))",
          message: 'Start with import "server-only".',
        },
        {
          selector:
            ":function:has(CallExpression[callee.name='withTransaction']):not(:has(CallExpression[callee.name='appendRecord']))",
          message: "A mutation appends to the record.",
        },
        {
          selector:
            ":function:has(CallExpression[callee.name='withTransaction']):not(:has(CallExpression[callee.name='authorize']))",
          message: "A mutation authorizes its actor.",
        },
      ],
      "no-restricted-imports": [
        "error",
        ban(["next", "next/*", "react", "react-dom"], "Services do not know the web."),
      ],
    },
  },
  {
    files: ["tests/**/*.{ts,tsx}", "scripts/**/*.{ts,mjs}"],
    rules: { "no-console": "off", "@typescript-eslint/no-non-null-assertion": "off" },
  },
);
