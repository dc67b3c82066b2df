const layer = (from, mayReach, comment) => ({
  name: `layer-${from.replace(/\W+/g, '-')}`,
  severity: 'error',
  comment,
  from: { path: `^${from}/`, pathNot: '\\.test\\.tsx?$' },
  to: { path: '^(app|db|workers|fake-sensors|tests|lib)/', pathNot: `^(${mayReach.join('|')})/` },
})

/** ESLint sees import statements only; this also sees `import()` and cycles. */
module.exports = {
  forbidden: [
    {
      name: 'no-circular',
      severity: 'error',
      comment: 'A cycle hides which of two files is the foundation.',
      from: {},
      to: { circular: true },
    },
    {
      name: 'not-to-missing',
      severity: 'error',
      comment: 'The file or package is not there.',
      from: {},
      to: { couldNotResolve: true },
    },
    layer('lib', ['lib'], 'lib/ computes; it does no I/O.'),
    layer('db', ['db', 'lib'], 'db/ may import lib/ only.'),
    layer('workers', ['workers', 'db', 'lib'], 'workers/ may import db/ and lib/.'),
    layer('fake-sensors', ['fake-sensors', 'lib'], 'Hardware knows MQTT, not our database.'),
    layer('app/_server', ['app', 'db', 'lib'], '_server/ may import db/ and lib/.'),
    {
      name: 'pages-through-server',
      severity: 'error',
      comment: 'Routes and pages reach data through app/_server/.',
      from: { path: '^app/', pathNot: ['^app/_server/', '\\.test\\.tsx?$'] },
      to: { path: '^(db|workers|fake-sensors|tests)/' },
    },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '^(\\.next|node_modules)/' },
    tsConfig: { fileName: 'tsconfig.json' },
    tsPreCompilationDeps: false,
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
      extensions: ['.ts', '.tsx', '.mjs', '.js', '.json', '.css'],
    },
  },
}
