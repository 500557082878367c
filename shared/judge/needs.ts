import type { Level } from '../findings/finding.ts';
import type { HouseRules } from '../rules/house-rules.ts';
import type { Found } from './check.ts';

type Need = HouseRules['bring']['roughMix'];

/** What is required has its code's own level; what would be welcome is only noted. */
export function asked(need: Need, make: (rest: { level?: Level }) => Found): Found[] {
  switch (need) {
    case 'required':
      return [make({})];
    case 'welcome':
      return [make({ level: 'note' })];
    case 'not-needed':
      return [];
  }
}
