// The import table of ARCHITECTURE (printed in DEVELOPERS.md), layer by layer, and no cycles.
// Each layer lists all it may import; everything else inside the project is a fault.

const layers = [
  // [name, folder, folders and files it may import]
  ["result", "^engine/(result|sha256)\\.ts$", []],
  ["notation", "^engine/notation/", ["result", "notation"]],
  ["fields", "^engine/fields/", ["result", "fields"]],
  ["kinematics", "^engine/kinematics/", ["result", "fields", "kinematics"]],
  ["tape", "^engine/tape/", ["result", "notation", "fields", "kinematics", "tape"]],
  ["sources", "^engine/sources/", ["result", "fields", "kinematics", "sources"]],
  ["evaluate", "^engine/evaluate/", ["result", "notation", "fields", "kinematics", "evaluate"]],
  ["derive", "^engine/derive/", ["result", "notation", "fields", "kinematics", "derive"]],
  ["solve", "^engine/solve/", ["result", "fields", "tape", "solve"]],
  [
    "checks",
    "^engine/checks/",
    ["result", "notation", "fields", "kinematics", "tape", "sources", "evaluate", "derive", "solve", "checks"],
  ],
  [
    "certificate",
    "^engine/certificate/",
    [
      "result",
      "notation",
      "fields",
      "kinematics",
      "tape",
      "sources",
      "evaluate",
      "derive",
      "solve",
      "checks",
      "certificate",
    ],
  ],
  [
    "export",
    "^engine/export/",
    [
      "result",
      "notation",
      "fields",
      "kinematics",
      "tape",
      "sources",
      "evaluate",
      "derive",
      "solve",
      "checks",
      "export",
    ],
  ],
  ["cli", "^engine/cli/", ["result", "index", "cli"]],
  [
    "index",
    "^engine/index\\.ts$",
    [
      "result",
      "notation",
      "fields",
      "kinematics",
      "tape",
      "sources",
      "evaluate",
      "derive",
      "solve",
      "checks",
      "certificate",
      "export",
    ],
  ],
  ["contract", "^app/_contract/", ["engine", "contract"]],
  ["server", "^app/_server/", ["contract", "engine", "generated", "server"]],
  ["api", "^app/api/", ["server", "contract", "api"]],
  ["ui", "^app/_ui/", ["contract", "engine", "ui"]],
  // The proxy sets headers before a page is chosen; layout and pages share the top of app/.
  ["pages", "^app/(\\(|[^_/]+\\.(tsx?|css)$)", ["server", "ui", "contract", "engine", "pages"]],
  ["proxy", "^(proxy|instrumentation)\\.ts$", ["server", "contract"]],
  ["prisma", "^prisma/", ["server", "prisma"]],
  ["e2e", "^e2e/", ["e2e"]],
];

const folder = Object.fromEntries(layers.map(([name, path]) => [name, path]));
folder.engine = "^engine/(?!cli/)";
folder.generated = "^generated/";

/** What a layer must not reach: any file of the project outside the folders it may import. */
const rules = layers.map(([name, path, allowed]) => ({
  name: `only-what-${name}-may-import`,
  severity: "error",
  comment: `${path} may import: ${allowed.join(", ") || "nothing"}`,
  from: { path: name === "server" ? `${path}(?!cli/|start/)` : path },
  to: {
    path: "^(engine|app|prisma|seed-data|tests|e2e|generated|proxy|instrumentation)[/.]",
    pathNot: allowed.map((other) => folder[other]),
  },
}));

const engine = "^engine/(?!cli/|tape/kernel/build\\.mjs$|tape/bench/)";

module.exports = {
  forbidden: [
    ...rules,
    {
      name: "no-cycles",
      severity: "error",
      from: { path: "^(engine|app|prisma|e2e)/" },
      to: { circular: true, viaOnly: { pathNot: "^generated/" } },
    },
    {
      name: "engine-is-pure",
      severity: "error",
      comment: "The engine runs in the browser: no Node modules, and of the packages only zod.",
      from: { path: engine },
      to: { dependencyTypes: ["core", "npm", "npm-dev", "npm-no-pkg", "npm-unknown"], pathNot: "^node_modules/zod/" },
    },
    {
      name: "only-the-dispatcher-loads-the-command-line",
      severity: "error",
      from: { path: "^app/_server/cli/" },
      to: { path: "^(engine|app)/", pathNot: ["^engine/", "^app/_server/"] },
    },
    {
      name: "start-scripts-run-tools",
      severity: "error",
      comment:
        "The start scripts run before anything is built: they import only scripts, the database tools among them.",
      from: { path: "^app/_server/start/" },
      to: { path: "^(engine|app|prisma|generated)/", pathNot: ["^app/_server/start/", "\\.mjs$"] },
    },
    {
      name: "e2e-speaks-http",
      severity: "error",
      from: { path: "^e2e/" },
      to: { path: "^(engine|app|prisma|generated|tests)/" },
    },
    { name: "resolvable", severity: "error", from: { pathNot: "^generated/" }, to: { couldNotResolve: true } },
    {
      name: "no-development-packages-in-the-program",
      severity: "error",
      from: { path: "^(engine|app)/", pathNot: "^app/_server/start/|^engine/tape/(kernel/build|bench/)" },
      to: { dependencyTypes: ["npm-dev"], dependencyTypesNot: ["type-only"] },
    },
  ],
  options: {
    doNotFollow: { path: "^(node_modules|generated)/" },
    exclude: { path: "\\.css$|\\.wasm$|^engine/tape/kernel/assembly/" },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: "tsconfig.json" },
    enhancedResolveOptions: {
      exportsFields: ["exports"],
      conditionNames: ["import", "require", "node", "default", "types"],
    },
  },
};
