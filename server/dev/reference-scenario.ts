import { eq } from 'drizzle-orm';
import { hashRules } from '#shared/rules/canonical-json.ts';
import { starterSets } from '#shared/rules/starter-sets.ts';
import { hashPassword } from '../accounts/passwords.ts';
import { findUserByEmail, insertUser } from '../accounts/queries.ts';
import type { Database, Transaction } from '../db/client.ts';
import { studioMembers, studios } from '../db/schema.ts';
import { putProjectMember } from '../invitations/queries.ts';
import { insertProject, insertSong, putAssistant } from '../projects/queries.ts';
import { insertEdition } from '../rules/queries.ts';
import { insertStudio } from '../studios/queries.ts';

const studioSlug = 'harbour-lane-mixing';

/** People of the demo data. Their passwords are known to everybody: never for real data. */
export const demoPeople = [
  {
    who: 'Maren Holt, engineer, owns Harbour Lane Mixing',
    name: 'Maren Holt',
    email: 'maren@harbour-lane.example',
    password: 'slow fader, warm room',
  },
  {
    who: 'Tobi Adler, assistant at Harbour Lane Mixing',
    name: 'Tobi Adler',
    email: 'tobi@harbour-lane.example',
    password: 'coffee before comping',
  },
  {
    who: 'Juno Park, artist, Velvet Tramline',
    name: 'Juno Park',
    email: 'juno@velvet-tramline.example',
    password: 'salt on every window',
  },
  {
    who: 'Sol Reyes, bandmate, Velvet Tramline',
    name: 'Sol Reyes',
    email: 'sol@velvet-tramline.example',
    password: 'the last night bus',
  },
] as const;

/**
 * Puts the reference scenario into a migrated database: studio, people, edition 1 of the house
 * rules, the EP with its three songs. All of it or nothing, and nothing when it is there already.
 * Returns whether it was stored now.
 */
export async function storeReferenceScenario(db: Database, now: Date): Promise<boolean> {
  if (await isStored(db)) return false;
  const hashes = await Promise.all(demoPeople.map(({ password }) => hashPassword(password)));
  return db.transaction(async (transaction) => {
    const keys: string[] = [];
    for (const [index, { name, email }] of demoPeople.entries()) {
      const passwordHash = hashes[index] ?? '';
      keys.push(await insertUser(transaction, { name, email, passwordHash, createdAt: now }));
    }
    const [maren = '', tobi = '', juno = '', sol = ''] = keys;
    await storeStudio(transaction, { maren, tobi, juno, sol }, now);
    return true;
  });
}

/** The slug tells, since people may change their address; an address may have been registered. */
async function isStored(db: Database): Promise<boolean> {
  const studio = await db.select().from(studios).where(eq(studios.slug, studioSlug));
  return studio.length > 0 || (await findUserByEmail(db, demoPeople[0].email)) !== null;
}

async function storeStudio(
  transaction: Transaction,
  { maren, tobi, juno, sol }: { maren: string; tobi: string; juno: string; sol: string },
  now: Date,
): Promise<void> {
  const { id: studioId } = await insertStudio(
    transaction,
    { slug: studioSlug, name: 'Harbour Lane Mixing', createdAt: now },
    maren,
  );
  await transaction
    .insert(studioMembers)
    .values({ studioId, userId: tobi, role: 'assistant', joinedAt: now });
  const rules = {
    ...starterSets['group-letter'],
    title: 'How files must arrive at Harbour Lane',
  };
  await insertEdition(transaction, {
    ...{ studioId, rules },
    number: 1,
    rulesHash: await hashRules(rules),
    changeSummary: '',
    publishedBy: maren,
    publishedAt: now,
  });
  const projectId = await insertProject(transaction, {
    studioId,
    title: 'Weather for Two',
    artistName: 'Velvet Tramline',
    createdAt: now,
  });
  await putAssistant(transaction, {
    ...{ projectId, userId: tobi },
    assistantStudioId: studioId,
    joinedAt: now,
  });
  await putProjectMember(transaction, { projectId, userId: juno, role: 'artist', joinedAt: now });
  await putProjectMember(transaction, { projectId, userId: sol, role: 'bandmate', joinedAt: now });
  for (const title of ['Salt on the Windows', 'Paper Ferry', 'Night Bus North']) {
    await insertSong(transaction, { projectId, title, createdAt: now });
  }
}
