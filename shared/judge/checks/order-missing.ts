import { found, type SessionCheck } from '../check.ts';
import { asked } from '../needs.ts';

/** Nobody said which parts matter most. */
export const orderMissing: SessionCheck = ({ rules, information }) =>
  information.orderOfImportance === null
    ? asked(rules.bring.orderOfImportance, (level) => found('order-missing', {}, level))
    : [];
