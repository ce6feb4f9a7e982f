/**
 * Where the stand-ins keep what they know: in memory, and in a folder as well if FAKES_DATA names one. Values go into
 * one JSON file that is replaced as a whole (written beside it, then renamed), bytes into one file each.
 */
import { createHash } from 'node:crypto';
import { mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

export class Storage {
  private readonly folder: string | null;
  private readonly values = new Map<string, () => unknown>();
  private readonly loaded: Record<string, unknown>;
  private readonly blobs = new Map<string, Buffer>();
  private saveWaits = false;

  /** Throws when the folder can't be made or its state file can't be read: starting empty would hide the loss. */
  constructor(folder: string | null) {
    this.folder = folder;
    if (!folder) {
      this.loaded = {};
      return;
    }
    mkdirSync(join(folder, 'bytes'), { recursive: true, mode: 0o700 });
    this.loaded = readState(join(folder, 'state.json'));
  }

  /** What was saved under a name, and from now on what to save under it. The caller wrote it, so its type is trusted. */
  keep<T>(name: string, empty: T, current: () => T): T {
    this.values.set(name, current);
    const saved = this.loaded[name];
    return saved === undefined ? empty : (saved as T);
  }

  /** Saves soon, once for all changes of the same turn of the event loop. */
  changed(): void {
    if (!this.folder || this.saveWaits) return;
    this.saveWaits = true;
    setImmediate(() => this.save());
  }

  save(): void {
    this.saveWaits = false;
    if (!this.folder) return;
    const state = Object.fromEntries([...this.values].map(([name, current]) => [name, current()]));
    const path = join(this.folder, 'state.json');
    writeFileSync(`${path}.new`, JSON.stringify(state), { mode: 0o600 });
    renameSync(`${path}.new`, path);
  }

  putBytes(key: string, bytes: Buffer): void {
    if (this.folder) writeFileSync(this.pathOf(key), bytes, { mode: 0o600 });
    else this.blobs.set(key, bytes);
  }

  findBytes(key: string): Buffer | null {
    if (!this.folder) return this.blobs.get(key) ?? null;
    try {
      return readFileSync(this.pathOf(key));
    } catch {
      return null;
    }
  }

  dropBytes(key: string): void {
    if (this.folder) rmSync(this.pathOf(key), { force: true });
    else this.blobs.delete(key);
  }

  // Keys come from outside; a hash keeps them from naming a path.
  private pathOf(key: string): string {
    return join(this.folder ?? '', 'bytes', createHash('sha256').update(key).digest('hex'));
  }
}

function readState(path: string): Record<string, unknown> {
  let text: string;
  try {
    text = readFileSync(path, 'utf8');
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return {};
    throw error;
  }
  const value: unknown = JSON.parse(text);
  if (typeof value !== 'object' || value === null) throw new Error(`${path} is not the stand-ins' state`);
  return { ...value };
}
