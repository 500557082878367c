import { createContext, useContext } from 'react';
import type { Bench } from './bench.ts';

/** The bench a finding lies on; null for a stored report, whose files are elsewhere. */
export const BenchContext = createContext<Bench | null>(null);

export function useBenchHere(): Bench | null {
  return useContext(BenchContext);
}
