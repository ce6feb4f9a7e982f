'use client';
/**
 * The browser's way to the use cases. The type parameter is a use case imported as a type, so that no server code
 * reaches the browser; the endpoint text is checked against it:
 *   const reserve = useCommand<typeof reserveBatch>('POST /batches/{batchId}/reserve')
 */
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useRef } from 'react';
import type { z } from 'zod';
import type { ProblemDetails } from './problem';
import type { UseCase } from './use-case';

type InputOf<U extends UseCase> = z.input<U['input']>;
type OutputOf<U extends UseCase> = z.output<U['output']>;

/** A refusal as the server told it. */
export class Problem extends Error {
  readonly details: ProblemDetails;
  constructor(details: ProblemDetails) {
    super(details.detail);
    this.name = 'Problem';
    this.details = details;
  }
}

/** Calls the API. `files` in the input (File objects) make it a multipart request. Throws Problem. */
export async function callApi<U extends UseCase>(
  endpoint: U['http'],
  input: InputOf<U>,
  options: { idempotencyKey?: string; signal?: AbortSignal } = {},
): Promise<OutputOf<U>> {
  const [method, template] = endpoint.split(' ') as [string, string];
  const rest: Record<string, unknown> = { ...(input as Record<string, unknown>) };
  let path = template.replace(/\{(\w+)\}/g, (_, name: string) => {
    const value = String(rest[name]);
    delete rest[name];
    return encodeURIComponent(value);
  });
  const headers: Record<string, string> = {};
  let body: BodyInit | undefined;
  if (method === 'GET' || method === 'DELETE') {
    const query = new URLSearchParams();
    for (const [name, value] of Object.entries(rest)) {
      if (value === undefined || value === null) continue;
      for (const item of Array.isArray(value) ? value : [value]) query.append(name, String(item));
    }
    if (query.size) path += `?${query}`;
  } else if (Object.values(rest).some((value) => value instanceof File)) {
    const form = new FormData();
    for (const [name, value] of Object.entries(rest))
      if (value !== undefined && value !== null) form.append(name, value instanceof File ? value : String(value));
    body = form;
  } else {
    headers['content-type'] = 'application/json';
    body = JSON.stringify(rest);
  }
  if (method !== 'GET') headers['idempotency-key'] = options.idempotencyKey ?? crypto.randomUUID();
  let response: Response;
  try {
    response = await fetch(`/api/v1${path}`, {
      method,
      headers,
      ...(body === undefined ? {} : { body }),
      ...(options.signal ? { signal: options.signal } : {}),
    });
  } catch (cause) {
    if (options.signal?.aborted) throw cause;
    throw new Problem({
      type: '/problems/service-away',
      title: 'No network',
      status: 0,
      detail: 'The workshop’s server can’t be reached. Nothing was changed; try again when the network is back.',
      instance: path,
      code: 'service.away',
      requestId: '',
    });
  }
  const answer: unknown = await response.json().catch(() => null);
  if (!response.ok) {
    throw new Problem(
      isProblem(answer)
        ? answer
        : {
            type: '/problems/bug',
            title: 'Our mistake',
            status: response.status,
            detail: `The server answered ${response.status} without a reason.`,
            instance: path,
            code: 'bug',
            requestId: response.headers.get('x-request-id') ?? '',
          },
    );
  }
  return answer as OutputOf<U>;
}

function isProblem(answer: unknown): answer is ProblemDetails {
  return answer !== null && typeof answer === 'object' && 'code' in answer && 'detail' in answer;
}

/**
 * A command or errand. One idempotency key per intention: pressing again after a lost answer repeats the key, so that
 * nothing is done twice; a success or a change of input takes a new one. On success every query is fetched afresh.
 */
export function useCommand<U extends UseCase>(endpoint: U['http']) {
  const cache = useQueryClient();
  const intention = useRef<{ input: string; key: string } | null>(null);
  return useMutation<OutputOf<U>, Problem, InputOf<U>>({
    mutationFn: async (input) => {
      const text = JSON.stringify(input);
      if (intention.current?.input !== text) intention.current = { input: text, key: crypto.randomUUID() };
      return callApi<U>(endpoint, input, { idempotencyKey: intention.current.key });
    },
    onSuccess: async () => {
      intention.current = null;
      await cache.invalidateQueries();
    },
    onError: (problem) => {
      // A refusal is an answer: the next press is a new request. Only an unknown outcome keeps the key.
      if (problem.details.status >= 400 && problem.details.status < 500 && problem.details.code !== 'request.running')
        intention.current = null;
    },
  });
}

export function useAnswer<U extends UseCase>(
  endpoint: U['http'],
  input: InputOf<U>,
  options: { enabled?: boolean; refetchIntervalMs?: number } = {},
) {
  return useQuery<OutputOf<U>, Problem>({
    queryKey: [endpoint, input],
    queryFn: ({ signal }) => callApi<U>(endpoint, input, { signal }),
    enabled: options.enabled ?? true,
    ...(options.refetchIntervalMs === undefined ? {} : { refetchInterval: options.refetchIntervalMs }),
    retry: (failures, problem) => problem.details.status >= 500 && failures < 2,
  });
}
