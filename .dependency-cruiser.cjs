/** Who may import whom; docs/architecture.md says why. @type {import('dependency-cruiser').IConfiguration} */
module.exports = {
  forbidden: [
    { name: 'no-cycles', severity: 'error', from: {}, to: { circular: true } },
    {
      name: 'client-sees-contract-and-calc-only',
      severity: 'error',
      from: { path: '^src/' },
      to: { path: '^(server/(?!contract/|calc/)|migrations/|seeds/|test/)' },
    },
    {
      name: 'server-knows-no-client',
      severity: 'error',
      from: { path: '^(server|migrations|seeds)/' },
      to: { path: '^src/' },
    },
    {
      name: 'contract-imports-zod-alone',
      severity: 'error',
      from: { path: '^server/contract/', pathNot: '\\.spec\\.ts$' },
      to: { pathNot: '^(server/contract/|node_modules/zod/)' },
    },
    {
      name: 'calc-imports-nothing-of-ours',
      severity: 'error',
      from: { path: '^server/calc/', pathNot: '\\.spec\\.ts$' },
      to: { path: '^(server/(?!calc/)|src/|migrations/|seeds/|test/)' },
    },
    {
      name: 'calc-has-no-io',
      severity: 'error',
      from: { path: '^server/calc/', pathNot: '\\.spec\\.ts$' },
      to: { dependencyTypes: ['core'] },
    },
    {
      name: 'platform-imports-contract-at-most',
      severity: 'error',
      from: { path: '^server/platform/', pathNot: '\\.spec\\.ts$' },
      to: { path: '^(server/(?!platform/|contract/)|src/|seeds/|test/)' },
    },
    {
      name: 'domains-meet-at-their-index',
      severity: 'error',
      from: { path: '^server/modules/([^/]+)/' },
      to: {
        path: '^server/modules/([^/]+)/',
        pathNot: ['^server/modules/$1/', '^server/modules/[^/]+/index\\.ts$'],
      },
    },
    {
      name: 'outsiders-enter-domains-by-index',
      severity: 'error',
      from: { path: '^server/', pathNot: '^server/modules/' },
      to: { path: '^server/modules/[^/]+/', pathNot: '^server/modules/[^/]+/index\\.ts$' },
    },
    {
      name: 'routes-never-touch-repositories',
      severity: 'error',
      from: { path: '-routes\\.ts$' },
      to: { path: '(-repository\\.ts$|^node_modules/knex/)' },
    },
    {
      name: 'only-repositories-and-queries-build-sql',
      severity: 'error',
      from: {
        path: '^server/',
        pathNot:
          '^server/(platform/|modules/.*(-repository|-query|-service)\\.ts$|modules/.*\\.spec\\.ts$|worker/main\\.ts$|start/)',
      },
      to: { path: '^node_modules/(knex|mysql2)/' },
    },
    {
      name: 'only-platform-uses-sdks',
      severity: 'error',
      from: { path: '^(server|seeds)/', pathNot: '^server/(platform|fakes)/|\\.spec\\.ts$' },
      to: { path: '^node_modules/(@aws-sdk|nodemailer|jsonwebtoken|argon2)/' },
    },
    {
      name: 'only-media-starts-ffmpeg',
      severity: 'error',
      from: { path: '^(server|seeds|test)/', pathNot: '^server/media/run\\.ts$' },
      to: { path: '^node_modules/fluent-ffmpeg/' },
    },
    {
      name: 'no-dev-dependency-at-run-time',
      severity: 'error',
      from: { path: '^(server|src|migrations|seeds)/', pathNot: '\\.spec\\.ts$' },
      to: { dependencyTypes: ['npm-dev'], dependencyTypesNot: ['type-only'] },
    },
    { name: 'resolvable', severity: 'error', from: {}, to: { couldNotResolve: true } },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.server.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
      extensions: ['.ts', '.mjs', '.js', '.cjs', '.json'],
    },
  },
};
