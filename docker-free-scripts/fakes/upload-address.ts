/** An address of the upload store: its signature, its time, and the file that it announces. */
import { createHmac, timingSafeEqual } from 'node:crypto';
import { type Answer, type Call, json } from './http';
import type { StoredFile } from './upload-state';

// Above the application's own 64 MB, so that its limit and not this one is what a person meets.
const MOST_FILE_BYTES = 128 * 1024 * 1024;

/** Null if the address is signed with the key and in time. The signature is over the raw text up to itself. */
export function refuseSignature(call: Call, uploadKey: string): Answer | null {
  const address = `http://${call.host}${call.rawUrl}`;
  const at = address.lastIndexOf('&signature=');
  if (at < 0) return json(403, { error: 'The address is not signed.' });
  const given = decoded(address.slice(at + '&signature='.length)) ?? '';
  const wanted = `hmac-sha256=${createHmac('sha256', uploadKey).update(address.slice(0, at)).digest('hex')}`;
  if (!sameText(given, wanted)) return json(403, { error: 'The signature does not fit the address.' });
  const expires = Number(call.query.get('expires'));
  return Number.isFinite(expires) && expires > Date.now() ? null : json(403, { error: 'The address has expired.' });
}

/** The file that a signed address announces; null where its name, type or size is missing or impossible. */
export function claimedFile(call: Call, key: string): StoredFile | null {
  // Values are percent-encoded once more than a query needs, so they are decoded once more.
  const value = (name: string): string | null => {
    const once = call.query.get(name);
    return once === null ? null : decoded(once);
  };
  const size = Number(value('x-ut-file-size') ?? '');
  const name = value('x-ut-file-name');
  const type = value('x-ut-file-type');
  if (!name || type === null || !Number.isInteger(size) || size < 0 || size > MOST_FILE_BYTES) return null;
  return {
    key,
    name,
    size,
    type,
    customId: value('x-ut-custom-id'),
    isPrivate: value('x-ut-acl') === 'private',
    disposition: value('x-ut-content-disposition') === 'attachment' ? 'attachment' : 'inline',
    received: 0,
    fileHash: null,
    uploadedAtMs: null,
    callback: 'none',
  };
}

/** Compares without telling by its time where the difference is. */
export function sameText(one: string, other: string): boolean {
  const [a, b] = [Buffer.from(one), Buffer.from(other)];
  return a.length === b.length && timingSafeEqual(a, b);
}

function decoded(encoded: string): string | null {
  try {
    return decodeURIComponent(encoded);
  } catch {
    return null;
  }
}
