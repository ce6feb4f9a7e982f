/** Answers of the upload store to a page of another origin: the application's. */
import { isLoopbackAddress } from './configuration';
import { type Answer, type Call, json } from './http';

export const uploadTrouble = (call: Call, status: number): Answer =>
  withCors(call, json(status, { error: status === 429 ? 'Too many requests.' : 'The store is in trouble.' }));

// The browser sends files from the application's origin to this one.
export function withCors(call: Call, answer: Answer): Answer {
  const origin = call.headers.origin;
  if (origin === undefined || !isLoopbackAddress(origin)) return answer;
  return {
    ...answer,
    headers: {
      ...answer.headers,
      'access-control-allow-origin': origin,
      'access-control-allow-methods': 'GET, HEAD, PUT, OPTIONS',
      'access-control-allow-headers': 'range, content-type, x-uploadthing-version, b3, traceparent',
      'access-control-expose-headers': 'x-ut-range-start',
      'access-control-max-age': '600',
      vary: 'origin',
    },
  };
}
