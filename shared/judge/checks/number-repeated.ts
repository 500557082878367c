import { found, type SessionCheck } from '../check.ts';
import { filesByNumber } from '../running-numbers.ts';

/** Two files carry one running number. */
export const numberRepeated: SessionCheck = (session) =>
  [...filesByNumber(session)]
    .filter(([, paths]) => paths.length > 1)
    .map(([number, files]) => found('number-repeated', { number }, { files }));
