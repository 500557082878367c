import type { HouseRules } from './house-rules.ts';

function write(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(write).join(',')}]`;
  if (typeof value !== 'object' || value === null) return JSON.stringify(value);
  const members = Object.entries(value)
    .filter(([, item]) => item !== undefined)
    .sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0))
    .map(([key, item]) => `${JSON.stringify(key)}:${write(item)}`);
  return `{${members.join(',')}}`;
}

/**
 * One text for equal rules, whatever the order of their keys: members sorted by UTF-16 code units,
 * no white space, numbers and strings as ECMAScript writes them (RFC 8785, sections 3.2.1 to
 * 3.2.3).
 */
export function canonicalJson(rules: HouseRules): string {
  return write(rules);
}

/** SHA-256 of the canonical JSON in UTF-8, as 64 lower-case hexadecimal digits. */
export async function hashRules(rules: HouseRules): Promise<string> {
  const bytes = new TextEncoder().encode(canonicalJson(rules));
  const digest = new Uint8Array(await crypto.subtle.digest('SHA-256', bytes));
  return Array.from(digest, (byte) => byte.toString(16).padStart(2, '0')).join('');
}
