/**
 * Files through UploadThing; the only server file that imports its SDK. The route lets the browser send a file straight
 * to the store; use cases are handed in, so that nothing of the domain is decided here. A file's name and type are what
 * the browser claimed: whoever reads it looks at its bytes.
 */
import 'server-only';
import type { NextRequest } from 'next/server';
import { createRouteHandler, createUploadthing } from 'uploadthing/next';
import { UTApi, UploadThingError } from 'uploadthing/server';
import { z } from 'zod';

export type IncomingFile = { name: string; size: number; claimedType: string };

/** What authorising an upload found out; it comes back with the finished file, signed by the store. */
export type UploadOwner = { workshopId: string; personId: string };

export type StoredUpload = IncomingFile & {
  /** Unique in the store; take note of a file once per key, since the store may call back again. */
  key: string;
  /** MD5 in hexadecimal, as the store gives it: tells equal files, proves nothing. */
  hash: string;
  owner: UploadOwner;
  /** What the browser said the upload is for. */
  circuitId: string | null;
};

export type UploadCalls = {
  /** Runs before size and type are checked by the SDK: write nothing. The message of a refusal is shown to the person. */
  authorise(
    request: NextRequest,
    file: IncomingFile,
    circuitId: string | null,
  ): Promise<{ ok: true; owner: UploadOwner } | { ok: false; message: string }>;
  /** Takes note of a finished file, idempotent by key; its answer reaches the browser as serverData.uploadId. */
  complete(file: StoredUpload): Promise<{ uploadId: string }>;
  /** Told of what went wrong, for the log; `key` is null where no file exists yet. */
  failed(error: unknown, key: string | null): void;
};

export type UploadAnswer = { ok: true; uploadId: string } | { ok: false; message: string };

export const MOST_UPLOAD_BYTES = 64 * 1024 * 1024;
const MOST_NAME_CHARACTERS = 255;
const DOWNLOAD_LIMIT_MS = 30_000;
const SIGNED_FOR_SECONDS = 60;
const COULD_NOT_START = 'The upload could not be started. Try again.';

const upload = createUploadthing({
  // Without it the client shows a general sentence instead of ours.
  errorFormatter: (error) => ({
    message: error.code === 'INTERNAL_SERVER_ERROR' ? COULD_NOT_START : sentenceOf(error),
  }),
});

/** The routes of the store's SDK, for its typed client: type PartsListRouter = ReturnType<typeof partsListRouter>. */
export function partsListRouter(calls: UploadCalls) {
  return {
    partsList: upload(
      {
        blob: {
          maxFileSize: '64MB',
          maxFileCount: 1,
          minFileCount: 1,
          acl: 'private',
          contentDisposition: 'attachment',
        },
      },
      { awaitServerData: true, presignedURLTTL: '15 minutes' },
    )
      .input(z.object({ circuitId: z.uuid().nullable() }))
      .middleware(async ({ req, files, input }) => {
        const offered = acceptable(files);
        if (!offered.ok) return refuse('BAD_REQUEST', offered.message);
        let verdict: Awaited<ReturnType<UploadCalls['authorise']>>;
        try {
          verdict = await calls.authorise(req, offered.file, input.circuitId);
        } catch (error) {
          calls.failed(error, null);
          return refuse('INTERNAL_SERVER_ERROR', COULD_NOT_START);
        }
        if (!verdict.ok) return refuse('FORBIDDEN', verdict.message);
        return {
          workshopId: verdict.owner.workshopId,
          personId: verdict.owner.personId,
          circuitId: input.circuitId,
        };
      })
      .onUploadError(({ error, fileKey }) => calls.failed(error, fileKey))
      .onUploadComplete(async ({ file, metadata }): Promise<UploadAnswer> => {
        try {
          const { uploadId } = await calls.complete({
            key: file.key,
            name: file.name,
            size: file.size,
            claimedType: file.type,
            hash: file.fileHash,
            owner: { workshopId: metadata.workshopId, personId: metadata.personId },
            circuitId: metadata.circuitId,
          });
          return { ok: true, uploadId };
        } catch (error) {
          // A throw here is swallowed by the SDK and leaves the browser waiting.
          calls.failed(error, file.key);
          return { ok: false, message: 'The file arrived but could not be recorded. Send it again.' };
        }
      }),
  };
}

export type PartsListRouter = ReturnType<typeof partsListRouter>;

/** GET and POST of app/api/uploadthing/route.ts. Configuration comes from the UPLOADTHING_… variables. */
export function uploadHandlers(calls: UploadCalls): {
  GET: (request: NextRequest) => Promise<Response>;
  POST: (request: NextRequest) => Promise<Response>;
} {
  return createRouteHandler({ router: partsListRouter(calls) });
}

export type UploadFailure = {
  ok: false;
  reason: 'not-found' | 'too-large' | 'refused' | 'unreachable';
  message: string;
};

/** The bytes of a stored file, at most `mostBytes` of them, through an address signed for a minute. */
export async function fetchUpload(
  key: string,
  mostBytes: number = MOST_UPLOAD_BYTES,
): Promise<{ ok: true; bytes: Uint8Array } | UploadFailure> {
  const { ufsUrl } = await store().generateSignedURL(key, { expiresIn: SIGNED_FOR_SECONDS });
  try {
    const response = await fetch(ufsUrl, { signal: AbortSignal.timeout(DOWNLOAD_LIMIT_MS), cache: 'no-store' });
    if (!response.ok || !response.body) {
      await response.body?.cancel();
      if (response.status === 404) return { ok: false, reason: 'not-found', message: `no file ${key}` };
      return {
        ok: false,
        reason: response.status >= 500 ? 'unreachable' : 'refused',
        message: `the store answered ${response.status}`,
      };
    }
    const chunks: Uint8Array[] = [];
    let size = 0;
    const reader = response.body.getReader();
    for (let part = await reader.read(); !part.done; part = await reader.read()) {
      size += part.value.length;
      if (size > mostBytes) {
        await reader.cancel();
        return { ok: false, reason: 'too-large', message: `file ${key} is larger than ${mostBytes} bytes` };
      }
      chunks.push(part.value);
    }
    return { ok: true, bytes: Buffer.concat(chunks) };
  } catch (error) {
    return { ok: false, reason: 'unreachable', message: error instanceof Error ? error.message : String(error) };
  }
}

/** Removes a file; one that is gone already counts as removed. */
export async function deleteUpload(key: string): Promise<{ ok: true } | UploadFailure> {
  try {
    const { success } = await store().deleteFiles(key);
    return success ? { ok: true } : { ok: false, reason: 'refused', message: 'the store did not delete the file' };
  } catch (error) {
    return { ok: false, reason: 'unreachable', message: error instanceof Error ? error.message : String(error) };
  }
}

let made: UTApi | undefined;
const store = (): UTApi => (made ??= new UTApi());

/** What the SDK turns into a status and our sentence: it tells its own errors from others by their class. */
function refuse(code: 'BAD_REQUEST' | 'FORBIDDEN' | 'INTERNAL_SERVER_ERROR', message: string): Promise<never> {
  return Promise.reject(new UploadThingError({ code, message }));
}

/** The SDK itself lets an empty list and impossible sizes through. */
function acceptable(
  files: readonly { name: string; size: number; type: string }[],
): { ok: true; file: IncomingFile } | { ok: false; message: string } {
  const [file, ...others] = files;
  if (!file || others.length > 0) return { ok: false, message: 'Send one file at a time.' };
  if (!Number.isInteger(file.size) || file.size < 1) return { ok: false, message: 'The file is empty.' };
  if (file.size > MOST_UPLOAD_BYTES) return { ok: false, message: 'The file is larger than 64 MB.' };
  if (file.name.trim() === '' || file.name.length > MOST_NAME_CHARACTERS) {
    return { ok: false, message: `The file needs a name of at most ${MOST_NAME_CHARACTERS} characters.` };
  }
  return { ok: true, file: { name: file.name, size: file.size, claimedType: file.type } };
}

function sentenceOf(error: UploadThingError): string {
  // The SDK's own size check speaks of its configuration; ours comes first for all but a lie about the size.
  return error.message.startsWith('Invalid config') ? 'The file is too large or there are too many.' : error.message;
}
