/**
 * The one direction of imports (app → components → hooks and types of lib; app → use cases → db, services), checked by
 * docker-free-scripts/commands/boundaries.ts in every test run.
 */
const SERVER_LIB = '^(db|lib/(circuits|stores|purchasing|workshop|auth|services|api))/';
// The hooks, which reach use cases over HTTP.
const BROWSER_API = '^lib/api/client\\.tsx?$';

/** @type {import('dependency-cruiser').IConfiguration} */
const config = {
  forbidden: [
    {
      name: 'no-cycles',
      comment: 'Two modules that need each other are one module, or one of them is in the wrong place.',
      severity: 'error',
      from: {},
      to: { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } },
    },
    {
      name: 'resolvable',
      comment: 'Every import leads somewhere that package.json or the tree names.',
      severity: 'error',
      from: {},
      to: { couldNotResolve: true },
    },
    {
      name: 'electronics-stands-alone',
      comment: 'The electronics is pure: no package, no I/O, nothing of ours outside it.',
      severity: 'error',
      from: { path: '^lib/electronics/' },
      to: { pathNot: '^lib/electronics/' },
    },
    {
      name: 'planning-is-pure',
      comment: 'Planning knows the electronics and the solver, nothing else.',
      severity: 'error',
      from: { path: '^lib/planning/' },
      to: { pathNot: '^lib/(planning|electronics)/|(^|/)node_modules/highs/' },
    },
    {
      name: 'parts-list-is-pure',
      comment:
        'The reader takes bytes: it knows the electronics and the two spreadsheet readers; of Node only what handles bytes.',
      severity: 'error',
      from: { path: '^lib/parts-list/' },
      to: {
        pathNot:
          '^lib/(parts-list|electronics)/|(^|/)node_modules/(@types/)?(papaparse|exceljs)/|^(node:)?(buffer|stream|stream/promises|zlib|string_decoder)$',
      },
    },
    {
      name: 'sdk-only-in-services',
      comment: 'What talks to a hosted service or the queue is imported in lib/services and nowhere else.',
      severity: 'error',
      // The fakes are the other side of the wire; the upload client is the browser half and belongs to components.
      from: { path: '^(app|components|lib|db)/', pathNot: '^lib/services/' },
      to: {
        path: '(^|/)node_modules/(@types/)?(stripe|nodemailer|uploadthing|pg-boss)/',
        pathNot: '(^|/)node_modules/uploadthing/(client|dist/client)',
      },
    },
    {
      name: 'driver-only-in-db',
      comment: 'withWorkshop() in db/client.ts is the only way to a transaction.',
      severity: 'error',
      from: { path: '^(app|components|lib)/' },
      to: { path: '(^|/)node_modules/(@types/)?pg/' },
    },
    {
      name: 'components-stay-in-the-browser',
      comment: 'A component may take types and hooks of lib, never what runs on the server.',
      severity: 'error',
      from: { path: '^components/' },
      to: { path: SERVER_LIB, pathNot: BROWSER_API, dependencyTypesNot: ['type-only'] },
    },
    {
      name: 'components-know-no-route',
      severity: 'error',
      comment: 'app → components, not back.',
      from: { path: '^components/' },
      to: { path: '^app/' },
    },
    {
      name: 'lib-knows-no-screen',
      severity: 'error',
      comment: 'lib is below app and components.',
      from: { path: '^lib/' },
      to: { path: '^(app|components)/' },
    },
    {
      name: 'db-knows-no-screen-or-use-case',
      severity: 'error',
      comment:
        'The schema is the floor; the demo may run use cases, since it must go through the ledger like everybody.',
      from: { path: '^db/', pathNot: '^db/seed/' },
      to: { path: '^(app|components|lib/(circuits|stores|purchasing|workshop|services))/' },
    },
    {
      name: 'seed-knows-no-screen',
      severity: 'error',
      from: { path: '^db/seed/' },
      to: { path: '^(app|components)/' },
    },
    {
      name: 'routes-go-through-use-cases',
      comment: 'app reads and writes through use cases; the health route only asks whether the database answers.',
      severity: 'error',
      from: { path: '^app/', pathNot: '^app/api/health/' },
      to: { path: '^db/', dependencyTypesNot: ['type-only'] },
    },
    {
      name: 'product-knows-no-test-or-script',
      severity: 'error',
      comment: 'What is shipped depends on nothing that only tests and developers use.',
      from: { path: '^(app|components|lib|db)/' },
      to: { path: '^(tests|docker-free-scripts)/' },
    },
    {
      name: 'no-dev-package-in-the-product',
      severity: 'error',
      comment: 'npm ci --omit=dev must still give a product that runs.',
      from: { path: '^(app|components|lib|db)/' },
      to: { dependencyTypes: ['npm-dev'], dependencyTypesNot: ['type-only'], pathNot: '(^|/)node_modules/@types/' },
    },
  ],
  options: {
    doNotFollow: { path: '(^|/)node_modules/' },
    exclude: { path: '^(\\.next|\\.data|node_modules/\\.cache)/|^next-env\\.d\\.ts$' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
      extensions: ['.ts', '.tsx', '.mjs', '.js', '.json', '.css'],
    },
  },
};

export default config;
