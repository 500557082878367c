import { found, type SessionCheck } from '../check.ts';
import { asked } from '../needs.ts';

/** No file is the rough mix. Where the rules say so, an order of importance does instead. */
export const roughMixMissing: SessionCheck = ({ files, rules, information }) => {
  const { roughMix, orderInsteadOfRoughMix: orderWouldDo } = rules.bring;
  if (files.some(({ role }) => role === 'rough-mix')) return [];
  if (orderWouldDo && information.orderOfImportance !== null) return [];
  return asked(roughMix, (level) => found('rough-mix-missing', { orderWouldDo }, level));
};
