import { join } from 'node:path';

/** `migrations` beside `service`, in the sources as in `dist`. */
export const migrationsFolder: string = join(__dirname, '..', '..', '..', 'migrations');
