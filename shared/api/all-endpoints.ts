import * as accounts from './accounts.ts';
import type { Endpoint } from './endpoint.ts';
import * as invitations from './invitations.ts';
import * as projects from './projects.ts';
import * as reports from './reports.ts';
import * as rules from './rules.ts';
import * as studios from './studios.ts';

function isEndpoint(value: unknown): value is Endpoint {
  return typeof value === 'object' && value !== null && 'method' in value && 'path' in value;
}

/**
 * Every contract there is, by its name: what the server must have bound and what the test of
 * roles must have a row for. Pages import the single contracts instead, to load only theirs.
 */
export const allEndpoints: ReadonlyMap<string, Endpoint> = new Map(
  [accounts, invitations, projects, reports, rules, studios].flatMap((module) =>
    Object.entries<unknown>(module).filter((entry): entry is [string, Endpoint] =>
      isEndpoint(entry[1]),
    ),
  ),
);
