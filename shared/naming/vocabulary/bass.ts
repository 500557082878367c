import type { InstrumentEntry } from './entry.ts';

export const bass: readonly InstrumentEntry[] = [
  {
    written: 'Sub Bass',
    short: 'SubB',
    forms: 'sub bass, sub b, bass sub, sub bs, sub basso, sub bajo',
    unsure: '808, 808 bass, bass 808, sub, subs',
  },
  {
    written: 'Synth Bass',
    short: 'SynB',
    forms: `(synth|syn|synthesizer|sy|snth) (bass|bs|b), (bass|bs) (synth|syn|synthesizer),
      synthie bass`,
    misspelt: 'sinth bass, synh bass, snyth bass',
  },
  {
    written: 'Double Bass',
    short: 'DbBs',
    forms: `(double|dbl|db|upright|stand up) (bass|bs), kontrabass, contrabass, contra bass,
      contrebasse, contrabajo, contrabbasso, bass upright, string bass, db bs`,
    unsure: 'ub, cb, basses, acoustic bass, ac bass',
  },
  {
    written: 'Fretless Bass',
    short: 'FlBs',
    forms: 'fretless bass, bass fretless, fl bs',
    unsure: 'fretless',
  },
  {
    written: 'Bass',
    short: 'Bass',
    forms: `bass, bass (guitar|gtr|git|gt|guit|gitarre), bs (gtr|guitar), b gtr, b guitar, e bass,
      elec bass, electric bass, el bass, elektro bass, bajo, bajo electrico, basse, basso, guitare basse,
      baixo, bs, bss, bass line, finger bass, pick bass, bass part`,
    misspelt: 'bas, bsas, bassguitr, basss',
    general: true,
  },
];
