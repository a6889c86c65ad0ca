// The walls between the rooms: one rule a thought, each with its reason. `npm run walls` must see every file of src (tests/house/walls.test.ts).
const ground = ['units', 'problems', 'numeric'];
const rooms = [...ground, 'atomic', 'spectrum', 'readers', 'measure', 'identify', 'plasma', 'report', 'session', 'engine', 'cli', 'ui'];
const inside = (names) => `^src/(${names.join('|')})/`;

/** A rule: room `name` may import values from `values` only, and types from `types` besides. */
function room(name, thought, why, values, types = []) {
  const banned = rooms.filter((r) => r !== name && !values.includes(r));
  const typed = rooms.filter((r) => r !== name && !values.includes(r) && !types.includes(r));
  return [
    {
      name: thought,
      comment: why,
      severity: 'error',
      from: { path: `^src/${name}/` },
      to: { path: inside(banned), dependencyTypesNot: ['type-only'] },
    },
    ...(typed.length
      ? [
          {
            name: `${thought}-types`,
            comment: why,
            severity: 'error',
            from: { path: `^src/${name}/` },
            to: { path: inside(typed), dependencyTypes: ['type-only'] },
          },
        ]
      : []),
  ];
}

export default {
  forbidden: [
    ...room('units', 'units-stand-alone', 'Quantities are the ground floor: nothing of ours below them.', []),
    ...room('problems', 'problems-stand-alone', 'A problem is plain data that crosses a worker.', []),
    ...room('numeric', 'numeric-knows-no-light', 'Mathematics that can be checked without astronomy.', ['problems']),
    ...room('atomic', 'atoms-know-no-spectrum', 'Atomic physics must be usable and checkable by itself.', ground),
    ...room('spectrum', 'a-spectrum-knows-no-atoms', 'Samples, frames and media are independent of what is read out of them.', ground),
    ...room('readers', 'readers-only-read', 'Reading interprets bytes, never lines.', ['spectrum', ...ground]),
    ...room(
      'measure',
      'measuring-knows-no-names',
      'A feature has no name until it is identified: measuring must not be biased by the line list.',
      ['spectrum', ...ground],
    ),
    ...room(
      'identify',
      'naming-sees-measured-types',
      'Naming takes finished features: it never measures again.',
      ['atomic', ...ground],
      ['measure', 'spectrum'],
    ),
    ...room(
      'plasma',
      'plasma-reads-named-lines',
      'Diagnostics take the accepted names as given.',
      ['atomic', ...ground],
      ['measure', 'identify'],
    ),
    ...room(
      'report',
      'writers-read-only-the-table',
      'A writer that computes would print what no other view shows.',
      ['units', 'problems'],
      ['numeric', 'atomic', 'spectrum', 'readers', 'measure', 'identify', 'plasma'],
    ),
    ...room(
      'session',
      'the-document-stores-only-choices',
      'Settings and verdicts are stored; everything else is derived.',
      ['units', 'problems'],
      ['numeric', 'atomic', 'spectrum', 'readers', 'measure', 'identify', 'plasma', 'report'],
    ),
    ...room(
      'engine',
      'the-engine-runs-without-a-screen',
      'The same engine serves the desk and the terminal.',
      rooms.filter((r) => !['engine', 'cli', 'ui'].includes(r)),
    ),
    ...room(
      'cli',
      'the-terminal-drives-the-engine',
      'No computing of its own in the terminal.',
      ['engine', 'report', 'session', 'units', 'problems'],
      rooms.filter((r) => r !== 'ui'),
    ),
    ...room(
      'ui',
      'the-screen-computes-nothing',
      'The screen reaches the engine by types only: no mathematics on the main thread.',
      ['session', 'report', 'units', 'problems'],
      rooms.filter((r) => r !== 'cli'),
    ),
    {
      name: 'one-door-a-room',
      comment: 'A room is entered through its index.ts: what is not listed there may change freely.',
      severity: 'error',
      from: { path: '^src/([^/]+)/' },
      to: { path: '^src/([^/]+)/', pathNot: ['^src/$1/', '^src/[^/]+/index\\.tsx?$', '^src/engine/worker\\.ts$'] },
    },
    { name: 'no-cycles', comment: 'A knot of imports cannot be taken apart again.', severity: 'error', from: {}, to: { circular: true } },
    {
      name: 'core-has-no-node',
      comment: 'The core runs unchanged in a browser worker.',
      severity: 'error',
      from: { path: '^src/', pathNot: ['^src/cli/', '^src/atomic/build/'] },
      to: { dependencyTypes: ['core'] },
    },
    { name: 'no-tests-in-src', comment: 'Test code never ships.', severity: 'error', from: { path: '^src/' }, to: { path: '^tests/' } },
    {
      name: 'no-dev-dependency-in-src',
      comment: 'What runs must be installed by a user.',
      severity: 'error',
      from: { path: '^src/', pathNot: '^src/atomic/build/' },
      to: { dependencyTypes: ['npm-dev'], pathNot: '@types/' },
    },
    {
      name: 'nothing-unreachable',
      comment: 'Code that no entry reaches is dead.',
      severity: 'error',
      from: { path: '^src/(ui/main\\.tsx|ui/offline/serviceWorker\\.ts|cli/main\\.ts|engine/worker\\.ts|atomic/build/main\\.ts)$' },
      to: {
        path: '^src/',
        pathNot: [
          '\\.d\\.ts$',
          '^src/(ui/main\\.tsx|ui/offline/serviceWorker\\.ts|cli/main\\.ts|engine/worker\\.ts|atomic/build/main\\.ts)$',
        ],
        reachable: false,
      },
    },
  ],
  options: {
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '\\.css$' },
  },
};
