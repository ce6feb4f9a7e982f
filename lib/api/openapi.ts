/** The OpenAPI 3.1 description, derived from the registered use cases and nothing else. */
import { z } from 'zod';
import type { UseCase } from './use-case';

type Json = Record<string, unknown>;

const PROBLEM_SCHEMA: Json = {
  type: 'object',
  description: 'RFC 9457 problem details',
  required: ['type', 'title', 'status', 'detail', 'instance', 'code', 'requestId'],
  properties: {
    type: { type: 'string' },
    title: { type: 'string' },
    status: { type: 'integer' },
    detail: { type: 'string', description: 'A sentence for a person' },
    instance: { type: 'string' },
    code: { type: 'string', description: 'Stable code for a program' },
    requestId: { type: 'string' },
    errors: {
      type: 'array',
      items: {
        type: 'object',
        properties: {
          pointer: { type: 'string', description: 'JSON pointer, or row and column of a file' },
          code: { type: 'string' },
          detail: { type: 'string' },
        },
      },
    },
    more: { description: 'More for a program: row, column and cure of a file; the current version; what is short' },
  },
};

export function openApi(useCases: readonly UseCase[], serverUrl: string): Json {
  const paths: Record<string, Json> = {};
  for (const useCase of useCases) {
    const [method, path] = useCase.http.split(' ') as [string, string];
    paths[path] = { ...paths[path], [method.toLowerCase()]: operation(useCase, method, path) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Ohmstead',
      version: '1',
      description: 'Everything the screens do. Sign in with a session cookie or send a bearer token.',
    },
    servers: [{ url: `${serverUrl}/api/v1` }],
    security: [{ session: [] }, { token: [] }],
    paths,
    components: {
      schemas: { Problem: PROBLEM_SCHEMA },
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: 'next-auth.session-token' },
        token: { type: 'http', scheme: 'bearer' },
      },
    },
  };
}

function operation(useCase: UseCase, method: string, path: string): Json {
  const input = jsonSchema(useCase.input, 'input');
  const properties = (input.properties ?? {}) as Record<string, Json>;
  const required = new Set((input.required as string[] | undefined) ?? []);
  const inPath = [...path.matchAll(/\{(\w+)\}/g)].flatMap((match) => match[1] ?? []);
  const parameters: Json[] = inPath.map((name) => ({
    name,
    in: 'path',
    required: true,
    schema: properties[name] ?? { type: 'string' },
  }));
  const others = Object.entries(properties).filter(([name]) => !inPath.includes(name));
  const asks = method === 'GET' || method === 'DELETE';
  if (asks)
    for (const [name, schema] of others) parameters.push({ name, in: 'query', required: required.has(name), schema });
  if (useCase.type === 'command' || useCase.type === 'errand') {
    parameters.push({
      name: 'Idempotency-Key',
      in: 'header',
      required: false,
      description: 'Same key and body: the first answer again. Same key, other body: 422. Still running: 409.',
      schema: { type: 'string', maxLength: 200 },
    });
  }
  const body = {
    type: 'object',
    properties: Object.fromEntries(others),
    required: others.map(([name]) => name).filter((name) => required.has(name)),
    additionalProperties: false,
  };
  const problem = {
    description: 'A problem',
    content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
  };
  return {
    operationId: useCase.name,
    summary: useCase.summary,
    tags: [useCase.name.split('.')[0]],
    description: `Roles: ${roleText(useCase)}.`,
    ...(useCase.type === 'open' ? { security: [] } : {}),
    parameters,
    ...(asks || others.length === 0
      ? {}
      : {
          requestBody: {
            required: true,
            content: {
              [useCase.multipartLimitBytes === undefined ? 'application/json' : 'multipart/form-data']: {
                schema: body,
              },
            },
          },
        }),
    responses: {
      200: { description: 'Done', content: { 'application/json': { schema: jsonSchema(useCase.output, 'output') } } },
      default: problem,
    },
  };
}

function roleText({ roles }: UseCase): string {
  if (roles === 'anyone') return 'none, before signing in';
  return roles === 'everyone' ? 'every member' : roles.join(', ');
}

function jsonSchema(schema: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, {
    io,
    unrepresentable: 'any',
    // A file in a form: the only input that JSON Schema has no type for.
    override: ({ zodSchema, jsonSchema: made }) => {
      if (zodSchema instanceof z.ZodCustom) Object.assign(made, { type: 'string', format: 'binary' });
    },
  });
  return rest as Json;
}
