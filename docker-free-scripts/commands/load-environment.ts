/**
 * Imported first by every command: reads .env.local, as Next.js does for the web process, and the owner's database
 * address, which the web and job processes never get. Commands run by hand so find the same database. Variables that are
 * already set win.
 */
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

for (const name of ['../../.env.local', '../../.data/owner.env']) {
  const file = fileURLToPath(new URL(name, import.meta.url));
  if (existsSync(file)) process.loadEnvFile(file);
}
