import { sql, type SQL } from 'drizzle-orm';
import {
  check,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  text,
  unique,
  uniqueIndex,
  uuid,
  type AnyPgColumn,
} from 'drizzle-orm/pg-core';
import type { Difference } from '#shared/api/reports.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { bytea, key, moment } from './columns.ts';

/*
 * Every list is ordered by its key (UUIDv7: the time of making), so the index of a list is
 * "what it belongs to, then id". Every foreign key is the first column of some index.
 * House-rules editions, reports and overviews are never changed: triggers in the migrations
 * refuse it, whoever asks. What the server keeps for its own work is in work-tables.ts.
 */

/** Addresses are compared as they are stored: trimmed, in lower case. */
function normalisedEmail(column: AnyPgColumn): SQL {
  return sql`${column} = lower(btrim(${column})) and length(${column}) between 3 and 254`;
}

/** SHA-256 of a secret in lower-case hexadecimal; the secret itself is never stored. */
function sha256Hex(column: AnyPgColumn): SQL {
  return sql`${column} ~ '^[0-9a-f]{64}$'`;
}

/** People with a confirmed address. Who has only asked for an account is an account_token. */
export const users = pgTable(
  'users',
  {
    id: key(),
    name: text('name').notNull(),
    email: text('email').notNull().unique('users_email_key'),
    /** argon2id in PHC string format. */
    passwordHash: text('password_hash').notNull(),
    createdAt: moment('created_at').notNull(),
  },
  (table) => [
    check('users_email_check', normalisedEmail(table.email)),
    check('users_name_check', sql`length(${table.name}) between 1 and 80`),
    check('users_password_hash_check', sql`${table.passwordHash} like '$argon2id$%'`),
  ],
);

/** Who is signed in where. */
export const sessions = pgTable(
  'sessions',
  {
    idHash: text('id_hash').primaryKey(),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    /** Start of the absolute lifetime. */
    createdAt: moment('created_at').notNull(),
    /** End of the idle lifetime; moved on while the session is used. */
    expiresAt: moment('expires_at').notNull(),
  },
  (table) => [
    index('sessions_user_id_idx').on(table.userId),
    index('sessions_expires_at_idx').on(table.expiresAt),
    check('sessions_id_hash_check', sha256Hex(table.idHash)),
  ],
);

/** Links in mails about an account: used once, and only for a while. */
export const accountTokens = pgTable(
  'account_tokens',
  {
    id: key(),
    kind: text('kind', {
      enum: ['confirm-account', 'reset-password', 'change-address'],
    }).notNull(),
    tokenHash: text('token_hash').notNull().unique('account_tokens_token_hash_key'),
    /** Null while there is no account yet. */
    userId: uuid('user_id').references(() => users.id, { onDelete: 'cascade' }),
    /** The address the mail went to. */
    email: text('email').notNull(),
    /** The name given on registering. */
    name: text('name'),
    createdAt: moment('created_at').notNull(),
    expiresAt: moment('expires_at').notNull(),
  },
  (table) => [
    index('account_tokens_user_id_idx').on(table.userId, table.kind),
    index('account_tokens_email_idx').on(table.email, table.kind),
    index('account_tokens_expires_at_idx').on(table.expiresAt),
    check('account_tokens_token_hash_check', sha256Hex(table.tokenHash)),
    check('account_tokens_email_check', normalisedEmail(table.email)),
    check(
      'account_tokens_kind_check',
      sql`case ${table.kind}
        when 'confirm-account' then ${table.userId} is null and ${table.name} is not null
        when 'reset-password' then ${table.userId} is not null and ${table.name} is null
        when 'change-address' then ${table.userId} is not null and ${table.name} is null
        else false end`,
    ),
  ],
);

export const studios = pgTable(
  'studios',
  {
    id: key(),
    slug: text('slug').notNull().unique('studios_slug_key'),
    name: text('name').notNull(),
    createdAt: moment('created_at').notNull(),
  },
  (table) => [
    check(
      'studios_slug_check',
      sql`${table.slug} ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length(${table.slug}) between 3 and 40`,
    ),
    check('studios_name_check', sql`length(${table.name}) between 1 and 80`),
  ],
);

export const studioMembers = pgTable(
  'studio_members',
  {
    id: key(),
    studioId: uuid('studio_id')
      .notNull()
      .references(() => studios.id, { onDelete: 'cascade' }),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id),
    role: text('role', { enum: ['owner', 'assistant'] }).notNull(),
    joinedAt: moment('joined_at').notNull(),
  },
  (table) => [
    unique('studio_members_studio_id_user_id_key').on(table.studioId, table.userId),
    index('studio_members_list_idx').on(table.studioId, table.id),
    index('studio_members_user_id_idx').on(table.userId, table.id),
    check('studio_members_role_check', sql`${table.role} in ('owner', 'assistant')`),
  ],
);

/** Published house rules; number 1, 2, 3 … in each studio. Never changed. */
export const houseRulesEditions = pgTable(
  'house_rules_editions',
  {
    id: key(),
    studioId: uuid('studio_id')
      .notNull()
      .references(() => studios.id),
    number: integer('number').notNull(),
    rules: jsonb('rules').$type<HouseRules>().notNull(),
    rulesHash: text('rules_hash').notNull(),
    changeSummary: text('change_summary').notNull(),
    publishedBy: uuid('published_by')
      .notNull()
      .references(() => users.id),
    publishedAt: moment('published_at').notNull(),
  },
  (table) => [
    unique('house_rules_editions_studio_id_number_key').on(table.studioId, table.number),
    // The target of projects.rules_edition_id: a project is held to its own studio's rules.
    unique('house_rules_editions_studio_id_id_key').on(table.studioId, table.id),
    index('house_rules_editions_published_by_idx').on(table.publishedBy),
    check('house_rules_editions_number_check', sql`${table.number} > 0`),
    check('house_rules_editions_rules_hash_check', sha256Hex(table.rulesHash)),
  ],
);

/** An engineer's work for an artist, or (private) one person's own checks. */
export const projects = pgTable(
  'projects',
  {
    id: key(),
    kind: text('kind', { enum: ['private', 'studio'] }).notNull(),
    studioId: uuid('studio_id').references(() => studios.id),
    /** Whose private project it is. */
    ownerId: uuid('owner_id').references(() => users.id),
    title: text('title').notNull(),
    artistName: text('artist_name'),
    rulesEditionId: uuid('rules_edition_id'),
    createdAt: moment('created_at').notNull(),
  },
  (table) => [
    // The target of project_members.assistant_studio_id.
    unique('projects_id_studio_id_key').on(table.id, table.studioId),
    index('projects_studio_id_idx').on(table.studioId, table.id),
    uniqueIndex('projects_owner_id_key').on(table.ownerId),
    index('projects_rules_edition_idx').on(table.studioId, table.rulesEditionId),
    foreignKey({
      name: 'projects_rules_edition_fk',
      columns: [table.studioId, table.rulesEditionId],
      foreignColumns: [houseRulesEditions.studioId, houseRulesEditions.id],
    }),
    check(
      'projects_kind_check',
      sql`case ${table.kind}
        when 'private' then ${table.ownerId} is not null and ${table.studioId} is null
          and ${table.artistName} is null and ${table.rulesEditionId} is null
        when 'studio' then ${table.ownerId} is null and ${table.studioId} is not null
          and ${table.artistName} is not null
        else false end`,
    ),
    check('projects_title_check', sql`length(${table.title}) between 1 and 120`),
  ],
);

export const projectMembers = pgTable(
  'project_members',
  {
    id: key(),
    projectId: uuid('project_id')
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id),
    role: text('role', { enum: ['artist', 'bandmate', 'assistant'] }).notNull(),
    /**
     * The project's studio, for assistants only. Two foreign keys hang on it: nobody assists
     * on a project of a studio they do not work for, and who leaves the studio leaves its
     * projects in the same moment.
     */
    assistantStudioId: uuid('assistant_studio_id'),
    joinedAt: moment('joined_at').notNull(),
  },
  (table) => [
    unique('project_members_project_id_user_id_key').on(table.projectId, table.userId),
    index('project_members_list_idx').on(table.projectId, table.id),
    index('project_members_user_id_idx').on(table.userId, table.projectId),
    index('project_members_assistant_idx').on(table.assistantStudioId, table.userId),
    foreignKey({
      name: 'project_members_assistant_fk',
      columns: [table.assistantStudioId, table.userId],
      foreignColumns: [studioMembers.studioId, studioMembers.userId],
    }).onDelete('cascade'),
    foreignKey({
      name: 'project_members_assistant_project_fk',
      columns: [table.projectId, table.assistantStudioId],
      foreignColumns: [projects.id, projects.studioId],
    }).onDelete('cascade'),
    check(
      'project_members_role_check',
      sql`${table.role} in ('artist', 'bandmate', 'assistant')
        and (${table.role} = 'assistant') = (${table.assistantStudioId} is not null)`,
    ),
  ],
);

/** Links that make somebody an assistant of a studio, or an artist or bandmate of a project. */
export const invitations = pgTable(
  'invitations',
  {
    id: key(),
    tokenHash: text('token_hash').notNull().unique('invitations_token_hash_key'),
    email: text('email').notNull(),
    role: text('role', { enum: ['assistant', 'artist', 'bandmate'] }).notNull(),
    studioId: uuid('studio_id').references(() => studios.id, { onDelete: 'cascade' }),
    projectId: uuid('project_id').references(() => projects.id, { onDelete: 'cascade' }),
    invitedBy: uuid('invited_by')
      .notNull()
      .references(() => users.id),
    createdAt: moment('created_at').notNull(),
    expiresAt: moment('expires_at').notNull(),
  },
  (table) => [
    // An accepted, revoked or replaced invitation is deleted: what is here is open.
    uniqueIndex('invitations_studio_id_email_key').on(table.studioId, table.email),
    uniqueIndex('invitations_project_id_email_key').on(table.projectId, table.email),
    index('invitations_studio_list_idx').on(table.studioId, table.id),
    index('invitations_project_list_idx').on(table.projectId, table.id),
    index('invitations_invited_by_idx').on(table.invitedBy),
    index('invitations_expires_at_idx').on(table.expiresAt),
    check('invitations_token_hash_check', sha256Hex(table.tokenHash)),
    check('invitations_email_check', normalisedEmail(table.email)),
    check(
      'invitations_role_check',
      sql`case ${table.role}
        when 'assistant' then ${table.studioId} is not null and ${table.projectId} is null
        when 'artist' then ${table.projectId} is not null and ${table.studioId} is null
        when 'bandmate' then ${table.projectId} is not null and ${table.studioId} is null
        else false end`,
    ),
  ],
);

export const songs = pgTable(
  'songs',
  {
    id: key(),
    projectId: uuid('project_id')
      .notNull()
      .references(() => projects.id),
    title: text('title').notNull(),
    createdAt: moment('created_at').notNull(),
  },
  (table) => [
    index('songs_list_idx').on(table.projectId, table.id),
    check('songs_title_check', sql`length(${table.title}) between 1 and 120`),
  ],
);

/** What a check found. Never changed. */
export const reports = pgTable(
  'reports',
  {
    id: key(),
    songId: uuid('song_id')
      .notNull()
      .references(() => songs.id),
    /** Made by the sender once per report, so that sending again stores nothing twice. */
    submissionId: uuid('submission_id').notNull(),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    createdAt: moment('created_at').notNull(),
    /** Null when the check ran against rules that no studio published. */
    rulesEditionId: uuid('rules_edition_id').references(() => houseRulesEditions.id),
    rulesHash: text('rules_hash').notNull(),
    reportSchema: integer('report_schema').notNull(),
    measureVersion: integer('measure_version').notNull(),
    judgeVersion: integer('judge_version').notNull(),
    verdict: text('verdict', { enum: ['ready', 'look', 'must-fix'] }).notNull(),
    counts: jsonb('counts').$type<CheckReport['counts']>().notNull(),
    judgedAgain: text('judged_again', { enum: ['same', 'differs', 'not-compared'] }).notNull(),
    differences: jsonb('differences').$type<Difference[]>().notNull(),
    report: jsonb('report').$type<CheckReport>().notNull(),
  },
  (table) => [
    unique('reports_song_id_submission_id_key').on(table.songId, table.submissionId),
    index('reports_song_list_idx').on(table.songId, table.id),
    index('reports_creator_list_idx').on(table.createdBy, table.id),
    index('reports_rules_edition_id_idx').on(table.rulesEditionId),
    check('reports_rules_hash_check', sha256Hex(table.rulesHash)),
    check('reports_verdict_check', sql`${table.verdict} in ('ready', 'look', 'must-fix')`),
    check(
      'reports_judged_again_check',
      sql`(${table.judgedAgain} = 'differs') = (jsonb_array_length(${table.differences}) > 0)
        and ${table.judgedAgain} in ('same', 'differs', 'not-compared')`,
    ),
    // The service counts the 2 MiB as they were sent; PostgreSQL spells the same JSON longer.
    check('reports_report_check', sql`octet_length(${table.report}::text) <= 4194304`),
  ],
);

/** Pictures of the sound of a report's files, gzip. Never changed. */
export const reportOverviews = pgTable(
  'report_overviews',
  {
    reportId: uuid('report_id')
      .primaryKey()
      .references(() => reports.id),
    overviews: bytea('overviews').notNull(),
    createdAt: moment('created_at').notNull(),
  },
  (table) => [
    check('report_overviews_overviews_check', sql`octet_length(${table.overviews}) <= 8388608`),
  ],
);

/** Links with which anybody can read one report. A revoked one is deleted. */
export const reportShares = pgTable(
  'report_shares',
  {
    id: key(),
    reportId: uuid('report_id')
      .notNull()
      .references(() => reports.id, { onDelete: 'cascade' }),
    tokenHash: text('token_hash').notNull().unique('report_shares_token_hash_key'),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    createdAt: moment('created_at').notNull(),
    expiresAt: moment('expires_at').notNull(),
  },
  (table) => [
    index('report_shares_list_idx').on(table.reportId, table.id),
    index('report_shares_created_by_idx').on(table.createdBy),
    index('report_shares_expires_at_idx').on(table.expiresAt),
    check('report_shares_token_hash_check', sha256Hex(table.tokenHash)),
  ],
);
