/** The arrows between folders. `tests/unit/architecture.test.ts` runs them; DEVELOPERS.md draws them. */

/** The core: the stages of the pipeline in order. Each may look into those before it, never upward. */
const stages = [
  'units',
  'geometry',
  'walls',
  'prep',
  'contours',
  'seams',
  'events',
  'solid',
  'jet',
  'passes',
  'interference',
  'head',
  'way-out',
  'process',
  'accuracy',
  'findings',
  'evaluate',
]

/** Inside shared, each folder with the folders that it may look into. */
const sharedArrows = {
  ...Object.fromEntries(stages.map((stage, i) => [stage, stages.slice(0, i)])),
  drawing: ['geometry', 'units'],
  setup: stages,
  joint: [...stages, 'setup'],
  files: [...stages, 'setup', 'joint'],
  api: [...stages, 'drawing', 'setup'],
}

/** Inside src, the rooms below the screens; screens (`features`) may use them all. */
const rooms = ['theme', 'api', 'ui', 'section', 'viewer', 'evaluation', 'revision']

export default {
  forbidden: [
    { name: 'no-cycles', severity: 'error', from: {}, to: { circular: true } },
    { name: 'no-unresolved', severity: 'error', from: {}, to: { couldNotResolve: true } },
    { name: 'server-not-src', severity: 'error', from: { path: '^server/' }, to: { path: '^src/' } },
    { name: 'src-not-server', severity: 'error', from: { path: '^src/' }, to: { path: '^server/' } },
    {
      name: 'product-not-tests',
      severity: 'error',
      from: { path: '^(src|server|shared)/' },
      to: { path: '^tests/' },
    },
    {
      name: 'shared-stands-alone',
      comment: 'shared depends on itself, a schema library, mathjs and dxf-parser',
      severity: 'error',
      from: { path: '^shared/' },
      to: { pathNot: '^(shared/|node_modules/(zod|mathjs|dxf-parser)/)' },
    },
    {
      name: 'dxf-parser-in-drawing-only',
      severity: 'error',
      from: { path: '^shared/', pathNot: '^shared/drawing/' },
      to: { path: '^node_modules/dxf-parser/' },
    },
    ...Object.entries(sharedArrows).map(([folder, may]) => ({
      name: `shared-${folder}`,
      severity: 'error',
      from: { path: `^shared/${folder}/` },
      to: { path: '^shared/', pathNot: `^shared/(${[folder, ...may].join('|')})/` },
    })),
    {
      name: 'screens-apart',
      comment: 'a screen never imports another screen',
      severity: 'error',
      from: { path: '^src/features/([^/]+)/' },
      to: { path: '^src/features/', pathNot: '^src/features/$1/' },
    },
    {
      name: 'rooms-below-screens',
      severity: 'error',
      from: { path: `^src/(${rooms.join('|')})/` },
      to: { path: '^src/features/' },
    },
    {
      name: 'resources-apart',
      comment: 'a resource of the server never imports the migrations or the seed',
      severity: 'error',
      from: { path: '^server/features/' },
      to: { path: '^server/(db/migrations|demo|run)/' },
    },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
    },
  },
}
