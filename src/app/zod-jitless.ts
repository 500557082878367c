/**
 * Tells zod, before any schema is made, never to compile validators from strings: the content
 * security policy forbids it. zod keeps its settings in this global (so that several copies share
 * them); setting it here costs no kilobyte, while `z.config()` would pull zod into the first page.
 * Import this file first, in the page and in every worker that parses with zod.
 */
const shared = globalThis as { __zod_globalConfig?: { jitless?: boolean } };
shared.__zod_globalConfig = Object.assign(shared.__zod_globalConfig ?? {}, { jitless: true });
