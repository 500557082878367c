import type { HouseRules } from '../rules/house-rules.ts';

/**
 * Somebody asked for names to follow the convention. Where nobody did, names are still proposed
 * by it, but no name is wrong for not following it.
 */
export function namingInForce({ levels }: HouseRules): boolean {
  return levels['name-breaks-rule']?.level !== 'off';
}
