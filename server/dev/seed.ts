import { openDatabase } from '../db/client.ts';
import { demoPeople, storeReferenceScenario } from './reference-scenario.ts';

/**
 * Stores the demo data in the database of DATABASE_URL unless it is there, and prints the
 * sign-ins as one JSON list of { who, email, password } on stdout.
 */
const databaseUrl = process.env.DATABASE_URL;
if (databaseUrl) {
  const { db, close } = openDatabase(databaseUrl, 1);
  try {
    await storeReferenceScenario(db, new Date());
    const signIns = demoPeople.map(({ who, email, password }) => ({ who, email, password }));
    console.log(JSON.stringify(signIns));
  } finally {
    await close();
  }
} else {
  console.error('Set DATABASE_URL to the migrated database that is to get the demo data.');
  process.exitCode = 2;
}
