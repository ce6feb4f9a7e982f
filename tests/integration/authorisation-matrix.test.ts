/** Every use case of the registry against every role, no session, and its route: what `roles` says is what happens. */
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { beforeEach, describe, expect, it } from 'vitest';
import { newId } from '@/db/schema/new-id';
import { perform } from '@/lib/api/perform';
import { Refusal } from '@/lib/api/problem';
import type { UseCase } from '@/lib/api/use-case';
import { useCases } from '@/lib/registry';
import { sampleInput } from '../support/sample-input';
import { makeWorkshop, type TestWorkshop } from '../support/workshop';

const ROLES = ['builder', 'storekeeper', 'buyer', 'lead'] as const;

let shop: TestWorkshop;

// One for each: ending sessions is a use case too.
beforeEach(async () => {
  shop = await makeWorkshop('Matrix');
});

/** The code it was refused with, or `done`. */
async function outcome(
  useCase: UseCase,
  credentials: TestWorkshop['as']['lead'] | null,
  input: unknown,
): Promise<string> {
  try {
    await perform(useCase, { credentials, input, requestId: newId(), idempotencyKey: null });
    return 'done';
  } catch (error) {
    if (error instanceof Refusal) return error.code;
    throw error;
  }
}

const guarded = useCases.filter((one) => one.type !== 'open');

describe('who may do what', () => {
  for (const useCase of guarded) {
    it(`${useCase.http} is for ${useCase.roles === 'everyone' ? 'everyone' : useCase.roles.join(', ')}`, async () => {
      const input = sampleInput(useCase);
      expect(useCase.input.safeParse(input), JSON.stringify(input)).toMatchObject({ success: true });
      expect(await outcome(useCase, null, input)).toBe('signed-out');
      for (const role of ROLES) {
        const may = useCase.roles === 'everyone' || useCase.roles.includes(role);
        const said = await outcome(useCase, shop.as[role], input);
        if (may) expect(['not-allowed', 'signed-out', 'input.invalid', 'bug'], `${role}: ${said}`).not.toContain(said);
        else expect(said, role).toBe('not-allowed');
      }
    });
  }

  it('somebody who left the workshop may do nothing any more', async () => {
    const gone = { ...shop.as.lead, personId: newId() };
    for (const useCase of guarded.slice(0, 20)) {
      expect(['signed-out', 'not-allowed'], useCase.name).toContain(await outcome(useCase, gone, sampleInput(useCase)));
    }
  });
});

const routeFile = (endpoint: string): string =>
  path.join('app/api/v1', (endpoint.split(' ')[1] ?? '').replace(/\{(\w+)\}/g, '[$1]'), 'route.ts');

describe('routes', () => {
  it('every use case has the route that its definition names, and names are used once', () => {
    const missing = useCases.filter((one) => {
      const file = routeFile(one.http);
      const method = one.http.split(' ')[0] ?? '';
      return !existsSync(file) || !new RegExp(`export const ${method} = route\\(`).test(readFileSync(file, 'utf8'));
    });
    expect(missing.map((one) => one.http)).toEqual([]);
    expect(new Set(useCases.map((one) => one.name)).size).toBe(useCases.length);
    expect(new Set(useCases.map((one) => one.http)).size).toBe(useCases.length);
  });

  it('every method of every route is a use case of the registry', () => {
    const known = new Set(useCases.map((one) => `${one.http.split(' ')[0]} ${routeFile(one.http)}`));
    const files = readdirSync('app/api/v1', { recursive: true, encoding: 'utf8' })
      .filter((file) => path.basename(file) === 'route.ts')
      .map((file) => path.join('app/api/v1', file));
    const found = files.flatMap((file) =>
      [...readFileSync(file, 'utf8').matchAll(/export const (GET|POST|PUT|PATCH|DELETE)\b/g)].map(
        (match) => `${match[1]} ${file}`,
      ),
    );
    expect(found.filter((one) => !known.has(one))).toEqual([]);
    expect(found.length).toBe(useCases.length);
  });
});
