/** The bytes of an uploaded original, from the database (API, paste) or the upload store. Calls a service: not inside a transaction that writes. */
import 'server-only';
import { Refusal } from '@/lib/api/problem';
import { fetchUpload } from '@/lib/services/uploads';

/** Files above this are refused before they are read. */
export const MOST_LIST_BYTES = 50 * 1024 * 1024;

export interface KeptOriginal {
  readonly fileName: string;
  readonly storeKey: string | null;
  readonly content: Uint8Array | null;
}

/** Throws Refusal `service.away` where the store does not answer, `not-found` where it has no such file. */
export async function bytesOf({ fileName, storeKey, content }: KeptOriginal): Promise<Uint8Array> {
  if (content !== null) return content;
  if (storeKey === null) throw new Error('an upload has neither bytes nor a key');
  const fetched = await fetchUpload(storeKey);
  if (fetched.ok) return fetched.bytes;
  if (fetched.reason === 'not-found')
    throw new Refusal('not-found', `The upload store has no file for ${fileName} any more. Send it again.`, {
      inner: fetched.message,
    });
  if (fetched.reason === 'too-large')
    throw new Refusal('too-large', `${fileName} is larger than a parts list may be. Nothing was read.`, {
      inner: fetched.message,
    });
  throw new Refusal(
    'service.away',
    `The upload store does not answer right now. ${fileName} is kept there; try again in a moment.`,
    { inner: fetched.message },
  );
}

/** An attachment under the name that it came with (RFC 6266, RFC 5987). */
export function attachment(bytes: BodyInit, fileName: string, type: string): Response {
  const plain = fileName.replace(/[^\x20-\x7e]|["\\%]/g, '_');
  return new Response(bytes, {
    headers: {
      'content-type': type,
      'content-disposition': `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(fileName).replace(/['()*]/g, (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`)}`,
      'cache-control': 'no-store',
      'x-content-type-options': 'nosniff',
    },
  });
}
