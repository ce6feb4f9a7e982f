/**
 * An input that a use case takes, made from the JSON Schema of its own zod definition: enough for what must be refused or
 * looked up, never for a success that matters.
 */
import { z } from 'zod';
import type { UseCase } from '@/lib/api/use-case';

interface Schema {
  readonly type?: string;
  readonly format?: string;
  readonly enum?: readonly unknown[];
  readonly const?: unknown;
  readonly anyOf?: readonly Schema[];
  readonly properties?: Readonly<Record<string, Schema>>;
  readonly required?: readonly string[];
  readonly items?: Schema;
  readonly minItems?: number;
  readonly minimum?: number;
  readonly exclusiveMinimum?: number;
  readonly minLength?: number;
}

/** Fields whose form a pattern or a rule across fields decides. */
const KNOWN_FIELDS: Readonly<Record<string, unknown>> = {
  code: 'Q',
  currency: 'EUR',
  email: 'somebody@example.invalid',
  unitPrice: '1.00',
  neededBy: '2027-01-01',
  pasted: undefined,
};

const MORE: Readonly<Record<string, Readonly<Record<string, unknown>>>> = {
  'revisions.create': { pasted: 'Ref,Qty,Value\nR1,1,1k\n' },
  'counts.enter': { emptyBinIds: ['00000000-0000-7000-8000-000000000000'] },
  'lines.change': { use: null },
  'stand-in.assess': { wanted: 'TL072CP', offered: 'TL072CN' },
  'parts.create': { text: '10k 1%' },
};

export function sampleInput(useCase: UseCase): Record<string, unknown> {
  const schema = z.toJSONSchema(useCase.input, { io: 'input', unrepresentable: 'any' }) as Schema;
  return { ...(sample(schema, '') as Record<string, unknown>), ...MORE[useCase.name] };
}

function sample(schema: Schema, field: string): unknown {
  if (field in KNOWN_FIELDS && KNOWN_FIELDS[field] !== undefined && schema.type === 'string')
    return KNOWN_FIELDS[field];
  if (schema.const !== undefined) return schema.const;
  if (schema.enum) return schema.enum[0];
  if (schema.anyOf) return sample(schema.anyOf[0] ?? {}, field);
  switch (schema.type) {
    case 'object': {
      const required = schema.required ?? [];
      return Object.fromEntries(required.map((name) => [name, sample(schema.properties?.[name] ?? {}, name)]));
    }
    case 'array':
      return Array.from({ length: schema.minItems ?? 0 }, () => sample(schema.items ?? {}, field));
    case 'integer':
    case 'number':
      return Math.max(schema.minimum ?? 0, (schema.exclusiveMinimum ?? -1) + 1);
    case 'boolean':
      return false;
    default:
      if (schema.format === 'uuid') return '00000000-0000-7000-8000-000000000000';
      if (schema.format === 'date') return '2027-01-01';
      if (schema.format === 'email') return 'somebody@example.invalid';
      return 'x'.repeat(Math.max(4, schema.minLength ?? 0));
  }
}
