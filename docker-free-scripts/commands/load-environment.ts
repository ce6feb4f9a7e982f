/**
 * Imported first by every command: reads .env.local, as Next.js does for the web process, so that commands run by hand
 * find the same database. Variables that are already set win.
 */
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const file = fileURLToPath(new URL('../../.env.local', import.meta.url));
if (existsSync(file)) process.loadEnvFile(file);
