/** Dependencies run one way: apps -> libs/ui -> libs/contracts -> libs/domain <- server (docs/decisions/0002). */
module.exports = {
  forbidden: [
    { name: 'no-circles', severity: 'error', from: {}, to: { circular: true } },
    {
      name: 'domain-is-pure',
      severity: 'error',
      from: { path: '^libs/domain' },
      to: { path: '^(apps|server|infra|test|libs/(contracts|ui))' },
    },
    {
      name: 'domain-no-node',
      severity: 'error',
      from: { path: '^libs/domain', pathNot: '\\.spec\\.ts$' },
      to: { dependencyTypes: ['core'] },
    },
    {
      name: 'contracts-know-only-domain',
      severity: 'error',
      from: { path: '^libs/contracts' },
      to: { path: '^(apps|server|infra|test|libs/ui)' },
    },
    {
      name: 'ui-knows-no-app',
      severity: 'error',
      from: { path: '^libs/ui' },
      to: { path: '^(apps|server|infra|test)' },
    },
    {
      name: 'server-knows-no-app',
      severity: 'error',
      from: { path: '^server' },
      to: { path: '^(apps|libs/ui|infra|test)' },
    },
    {
      name: 'app-knows-no-server',
      severity: 'error',
      from: { path: '^apps' },
      to: { path: '^(server|infra|test)' },
    },
    {
      name: 'core-knows-no-feature',
      severity: 'error',
      from: { path: '^server/src/core' },
      to: { path: '^server/src/features' },
    },
    {
      name: 'areas-share-nothing',
      severity: 'error',
      from: { path: '^apps/web/src/app/(shop|field|client|platform|public)/' },
      to: {
        path: '^apps/web/src/app/(shop|field|client|platform|public)/',
        pathNot: '^apps/web/src/app/$1/',
      },
    },
    {
      name: 'browser-without-zod',
      comment: 'zod is heavy: the browser imports contract types and generated tables only',
      severity: 'error',
      from: { path: '^(apps|libs/ui)' },
      to: { path: 'node_modules/zod', dependencyTypesNot: ['type-only'] },
    },
    { name: 'no-orphan-packages', severity: 'error', from: {}, to: { couldNotResolve: true } },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    tsConfig: { fileName: 'tsconfig.base.json' },
    tsPreCompilationDeps: true,
    exclude: { path: '\\.spec\\.ts$' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default'],
    },
  },
};
