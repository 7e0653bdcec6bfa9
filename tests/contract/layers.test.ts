import { RuleTester } from 'eslint';
import { describe, test } from 'vitest';

import { layerRule } from '../support/lint/layer-rule.mjs';

RuleTester.describe = describe;
RuleTester.it = test;

const options = [{ root: '/project' }];
const code = (from: string, target: string) => ({
  name: `${from} ← ${target}`,
  filename: `/project/${from}`,
  code: `import { part } from '${target}';`,
  options,
});
const refused = (from: string, target: string) => ({
  ...code(from, target),
  errors: [{ messageId: 'outside' }],
});

new RuleTester({ languageOptions: { ecmaVersion: 2022, sourceType: 'module' } }).run('layers', layerRule, {
  valid: [
    code('app/(main)/index.tsx', '../../src/features/fields/fields-screen'),
    code('app/index.tsx', '@/session/provider'),
    code('src/features/plans/plan-screen.tsx', './components/rates-table'),
    code('src/features/plans/components/rates-table.tsx', '../view-model'),
    code('src/features/plans/plan-screen.tsx', '../../ui/theme'),
    code('src/features/plans/plan-screen.tsx', '../../contract/plans'),
    code('src/lib/format.ts', '../../models/units'),
    code('src/contract/plans.ts', 'zod'),
    code('server/features/fields/week.ts', '../plans/service'),
    code('server/features/plans/routes.ts', './policy'),
    code('server/jobs/worker.ts', '../../models/scenario/plan-scenario'),
    code('server/features/plans/present.ts', '../../../src/contract/plans'),
    code('server/context.ts', 'node:fs'),
    code('db/schema/plans.ts', '../../src/contract/enums'),
    code('models/planning/cutting-plane.ts', 'highs'),
    code('models/planning/cutting-plane.ts', '../linalg/sparse-cholesky'),
    code('tests/server/jobs.test.ts', '../../server/jobs/queue'),
  ],
  invalid: [
    refused('app/index.tsx', '../server/config'),
    refused('app/index.tsx', '../models/units'),
    refused('src/features/plans/plan-screen.tsx', '../jobs/queries'),
    refused('src/features/plans/plan-screen.tsx', '@/features/jobs/queries'),
    refused('src/ui/button.tsx', '../features/plans/view-model'),
    refused('src/features/plans/view-model.ts', '../../../models/planning/quietest'),
    refused('src/lib/format.ts', '../../models/constants'),
    refused('src/api/client.ts', '../../server/errors'),
    refused('src/api/client.ts', 'node:http'),
    refused('src/api/client.ts', 'fs'),
    refused('src/contract/plans.ts', '../lib/format'),
    refused('src/contract/plans.ts', 'react'),
    refused('src/contract/enums.ts', './common'),
    refused('server/features/fields/week.ts', '../plans/policy'),
    refused('server/context.ts', '../src/ui/theme'),
    refused('db/store/plans.ts', '../../server/errors'),
    refused('db/schema/plans.ts', '../../src/contract/plans'),
    refused('models/planning/quietest.ts', '../../server/log'),
    refused('models/planning/quietest.ts', '../../src/contract/enums'),
    refused('models/planning/quietest.ts', 'node:fs'),
    refused('models/planning/quietest.ts', 'express'),
    {
      ...code('src/lib/format.ts', 'x'),
      name: 'a lazy import and a re-export count like any other',
      code: `export * from '../../server/log'; const late = import('../../db/client');`,
      errors: [{ messageId: 'outside' }, { messageId: 'outside' }],
    },
  ],
});
