/** Who may import whom: DEVELOPERS.md, "Import rules". */
const forbid = (name, from, to, comment) => ({
  name,
  severity: 'error',
  from: { path: from },
  to: { path: to },
  comment,
});

const rules = {
  forbidden: [
    {
      name: 'no-cycles',
      severity: 'error',
      from: {},
      to: { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } },
    },
    {
      name: 'no-orphan-packages',
      severity: 'error',
      from: { path: '^(app|components|lib|db|service-worker)/' },
      to: { dependencyTypes: ['npm-dev'], dependencyTypesNot: ['type-only'] },
    },
    forbid(
      'concrete-is-pure',
      '^lib/concrete/',
      '^(?!lib/concrete/|node_modules/@stdlib/)',
      "the trade's computation imports nothing of the project, and of packages only the distributions",
    ),
    forbid(
      'inspection-is-pure',
      '^lib/inspection/',
      '^(?!lib/(concrete|inspection)/|node_modules/(zod|canonicalize)/)',
      'plan, entries, sheet and holds import lib/concrete, zod and the canonical JSON only',
    ),
    forbid(
      'device-stays-on-device',
      '^lib/device/',
      '^(app|components|db|lib/server)/',
      "the phone's side knows nothing of the server's",
    ),
    forbid(
      'server-draws-nothing',
      '^(lib/server|db)/',
      '^(app|components|lib/device|service-worker)/',
      "the server's side never imports what the browser runs",
    ),
    forbid(
      'components-never-touch-server',
      '^components/',
      '^(db|lib/server|app)/',
      'db and lib/server never reach the browser',
    ),
    forbid(
      'ui-is-ignorant',
      '^components/ui/',
      '^components/(?!ui/)',
      'components/ui knows nothing of concrete',
    ),
    forbid(
      'drawings-stand-alone',
      '^components/drawings/',
      '^components/(?!drawings/)',
      'drawings import no other component folder',
    ),
    forbid(
      'field-is-offline',
      '^components/field/',
      '^components/office/',
      'the offline side imports nothing of the office',
    ),
    forbid(
      'office-is-online',
      '^components/office/',
      '^components/field/',
      'the office imports nothing of the offline side',
    ),
    forbid(
      'calculations-stand-alone',
      '^components/calculations/',
      '^(components/(?!calculations/|ui/|drawings/)|lib/device/)',
      'calculation pages rest on lib/concrete and on shared controls and drawings only',
    ),
    forbid('nothing-imports-app', '^(?!app/|tests/)', '^app/', 'routes are the outermost layer'),
    forbid(
      'worker-is-small',
      '^service-worker/',
      '^(app|components|db|lib/server)/',
      'the worker carries only what it serves',
    ),
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '^(\\.next|\\.data|public|tests/e2e/\\.)' },
    tsConfig: { fileName: 'tsconfig.json' },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
    },
  },
};

export default rules;
