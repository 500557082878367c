import type { Rejudge } from './compare-judgements.ts';

export const rejudge: Rejudge = () => null;
