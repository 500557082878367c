import type { InstrumentEntry } from './entry.ts';

export const keys: readonly InstrumentEntry[] = [
  {
    written: 'Electric Piano',
    short: 'EP',
    forms: `(electric|elec|elect|el|e|electr|elektro) (piano|pno|pn), electric grand, electric grand piano, e p, piano electrique,
      piano electrico, piano elettrico, (piano|pno) (elec|electric)`,
    misspelt: 'eletric piano, elecric piano',
    unsure: 'ep, epn',
  },
  {
    written: 'Toy Piano',
    short: 'TPno',
    forms: 'toy piano, toy pno, t pno',
  },
  {
    written: 'Piano',
    short: 'Pno',
    forms: `piano, pno, pian, pno, (grand|gr|upright|acoustic|ac|up|felt|tack|honky tonk) (piano|pno),
      piano (grand|upright), piano forte, klavier, fluegel, flugel, klav, piano a queue, piano droit,
      pianos`,
    misspelt: 'paino, pinao, painao, piiano',
    unsure: 'pn, pia',
  },
  {
    written: 'Organ',
    short: 'Org',
    forms: 'organ, org, orgel, orgue, organo, orgn, pipe organ, church organ, drawbar organ',
    misspelt: 'orgen, oragn',
  },
  { written: 'Clav', short: 'Clav', forms: 'clav, clavichord' },
  {
    written: 'Harpsichord',
    short: 'Hpsc',
    forms: 'harpsichord, hpsc, hpschd, cembalo, clavecin, clavicembalo',
  },
  { written: 'Celesta', short: 'Cels', forms: 'celesta, celeste, cels' },
  {
    written: 'Accordion',
    short: 'Accd',
    forms:
      'accordion, accd, accord, akkordeon, accordeon, acordeon, fisarmonica, bandoneon, concertina',
    misspelt: 'acordion, accordian',
  },
  { written: 'Harmonium', short: 'Hrmn', forms: 'harmonium, hrmn, pump organ, reed organ' },
  { written: 'Melodica', short: 'Mldc', forms: 'melodica, mldc, melodika' },
  { written: 'Music Box', short: 'MBox', forms: 'music box, m box, spieluhr, spieldose' },
  {
    written: 'Keys',
    short: 'Keys',
    forms: `keys, keyboard, keyboards, kys, kbd, keybd, teclado, teclados, clavier, claviers,
      tastiera, tastiere, tasten, key board`,
    misspelt: 'kyes, kesy, keyborad, kybd',
    unsure: 'ky, kb',
    general: true,
  },
];
