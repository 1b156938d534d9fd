/** `node --import tsx db/migrate.ts`: brings the database of DATABASE_URL to the newest schema. */
import { applyMigrations } from './apply-migrations';

const url = process.env.DATABASE_URL;
if (!url) {
  process.stderr.write('DATABASE_URL is not set. `npm start` and `npm run dev` set it; elsewhere give postgres://…\n');
  process.exit(1);
}
await applyMigrations(url);
process.stdout.write('The database has the newest schema.\n');
