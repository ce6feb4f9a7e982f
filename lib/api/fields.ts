/** The shapes that use cases share: ids, pages, instants, lists in a query string. */
import { z } from 'zod';

export const id = () => z.uuid();

/** 1-based page of at most 200 rows. */
export const pageFields = {
  page: z.coerce.number().int().min(1).max(1_000_000).default(1),
  size: z.coerce.number().int().min(1).max(200).default(50),
};

export function pageOf<Row extends z.ZodType>(row: Row) {
  return z.object({ rows: z.array(row), total: z.number().int(), page: z.number().int(), size: z.number().int() });
}

/** A moment as RFC 3339 text in UTC. */
export const instant = () => z.iso.datetime();

/** A calendar day as YYYY-MM-DD. */
export const day = () => z.iso.date();

/** One or several values of a query parameter. */
export function listOf<Item extends z.ZodType>(item: Item, most = 100) {
  return z.preprocess(
    (value) => (value === undefined || Array.isArray(value) ? value : [value]),
    z.array(item).max(most),
  );
}

/** A file that came in a multipart body. */
export const uploadedFile = () => z.object({ name: z.string().max(255), bytes: z.instanceof(Uint8Array) });

/** Text a person types: trimmed, not empty, no control characters but line breaks and tabs. */
export const words = (mostCharacters: number) =>
  z
    .string()
    .trim()
    .min(1)
    .max(mostCharacters)
    .refine((text) => !/[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/.test(text), 'has a control character in it');
