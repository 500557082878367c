import { found, type SessionCheck } from '../check.ts';
import { asked } from '../needs.ts';

/** No tempo was given; "no click" would be an answer. */
export const tempoMissing: SessionCheck = ({ rules, information }) =>
  information.tempo === null
    ? asked(rules.bring.tempo, (level) => found('tempo-missing', {}, level))
    : [];
