// What the cores tell of themselves.
import { resolve } from 'node:path';
import { expect, test } from 'vitest';
import { openCore } from '../../web/tools/open-core.mjs';
import { buildFolder } from '../page/driver/built';
import { schema } from './cores';

/** A schema as it validates: the descriptions are for people. */
function withoutDescriptions(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(withoutDescriptions);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value)
      .filter(([name, member]) => !(name === 'description' && typeof member === 'string'))
      .map(([name, member]) => [name, withoutDescriptions(member)]),
  );
}

test.each(['module', 'plain'] as const)('the %s core tells its version and its schema', async (kind) => {
  const core = await openCore(resolve(buildFolder, 'packed'), kind);
  expect(core.version()).toMatch(/^\d+\.\d+\.\d+$/);
  expect(JSON.parse(core.schema())).toEqual(withoutDescriptions(schema()));
});
