/**
 * A proposal for a studio's web address from its name: "Harbour Lane Mixing" becomes
 * "harbour-lane-mixing", accents are dropped, at most 40 characters. Empty where the name has no
 * Latin letter or digit.
 */
export function slugFrom(name: string): string {
  return name
    .normalize('NFKD')
    .replace(/\p{Mark}/gu, '')
    .toLowerCase()
    .replace(/['’]/g, '')
    .replace(/[^a-z0-9]+/g, '-')
    .slice(0, 40)
    .replace(/^-+|-+$/g, '');
}
