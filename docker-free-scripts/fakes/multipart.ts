/** The one part of a multipart/form-data body that the upload store reads: the field `file` (RFC 7578, RFC 2046 5.1). */
import { BadRequest } from './http';

export type FilePart = { bytes: Buffer; complete: boolean };

const MOST_HEADER_BYTES = 16_384;

/** Bytes of the field `file`; `complete` is false where the body ends before its boundary. Throws BadRequest for another shape. */
export function filePart(body: Buffer, contentType: string | undefined): FilePart {
  const boundary = /^multipart\/form-data;.*boundary=(?:"([^"]{1,70})"|([^;\s]{1,70}))/i.exec(contentType ?? '');
  const name = boundary?.[1] ?? boundary?.[2];
  if (!name) throw new BadRequest('expected multipart/form-data with a boundary');
  const opening = Buffer.from(`--${name}\r\n`);
  const start = body.indexOf(opening);
  if (start !== 0) throw new BadRequest('the body does not start with its boundary');
  const headerEnd = body.indexOf('\r\n\r\n', opening.length);
  if (headerEnd < 0 || headerEnd > MOST_HEADER_BYTES) throw new BadRequest('the part has no header');
  const header = body.subarray(opening.length, headerEnd).toString('utf8');
  if (!/^content-disposition:\s*form-data;.*\bname="file"/im.test(header))
    throw new BadRequest('the first field must be named file');
  const from = headerEnd + 4;
  const closing = Buffer.from(`\r\n--${name}`);
  const end = body.indexOf(closing, from);
  if (end >= 0) return { bytes: body.subarray(from, end), complete: true };
  // What came may end in the middle of the closing boundary, so its length is given up.
  return { bytes: body.subarray(from, Math.max(from, body.length - closing.length - 4)), complete: false };
}
