/** What the one field offers while somebody types, as GET /api/v1/find?q= answers it. */

export interface FindSuggestion {
  /** What it was recognised as: "part", "bin", "order", "circuit", "value", "bag". */
  readonly kind: string;
  readonly label: string;
  readonly detail: string | null;
  readonly href: string;
}

export type FetchSuggestions = (query: string, signal: AbortSignal) => Promise<readonly FindSuggestion[]>;

/** Asks the server. Any failure gives no suggestions: the field still goes to /find on Enter, which says what is wrong. */
export async function fetchSuggestions(query: string, signal: AbortSignal): Promise<readonly FindSuggestion[]> {
  const response = await fetch(`/api/v1/find?q=${encodeURIComponent(query)}`, {
    signal,
    headers: { accept: 'application/json' },
  });
  if (!response.ok) return [];
  const body: unknown = await response.json();
  return readSuggestions(body);
}

/** Takes `{ hits: [...] }`, leaves out what is misshapen and any address that does not stay in this application. */
export function readSuggestions(body: unknown): readonly FindSuggestion[] {
  const items = isRecord(body) ? body.hits : null;
  if (!Array.isArray(items)) return [];
  return items.flatMap((item: unknown) => {
    if (
      !isRecord(item) ||
      typeof item.what !== 'string' ||
      typeof item.title !== 'string' ||
      typeof item.href !== 'string'
    )
      return [];
    if (!/^\/(?![/\\])/.test(item.href)) return [];
    return [
      {
        kind: item.what,
        label: item.title,
        href: item.href,
        detail: typeof item.detail === 'string' ? item.detail : null,
      },
    ];
  });
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null;
}
