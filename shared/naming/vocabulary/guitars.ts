import type { InstrumentEntry } from './entry.ts';

/** Every way to write the bare word. */
const guitar = '(guitar|gtr|gtrs|git|guit|gt|gitarre|gitarren|guitare|guitarra|chitarra|gitar)';

export const guitars: readonly InstrumentEntry[] = [
  {
    written: 'Acoustic Guitar',
    short: 'AG',
    forms: `(acoustic|acoustics|ac|aco|acou|acous|acst|acc|akustik|a|western|folk|steel string) ${guitar},
      ${guitar} (acoustic|ac|acou|acous|akustik|acustica|acoustique|folk|seche|akustisch), ag, a g,
      acustica ${guitar}, steel string`,
    misspelt: `accoustic, acustic, acoustc, (accoustic|acustic|accustic|acoustik) ${guitar}`,
    unsure:
      'acoustic, acoustics, acous, acou, acgt, akustik, western, acustica, acoustique, a gt, violao',
  },
  {
    written: 'Electric Guitar',
    short: 'EG',
    forms: `(electric|electrics|elec|elect|electr|el|elc|e|elektro|electro) ${guitar},
      ${guitar} (electric|elec|elect|el|electrique|electrica|elettrica|elektrisch|electro), eg, e g`,
    misspelt: `eletric ${guitar}, elecric ${guitar}, elctric ${guitar}, electirc ${guitar}`,
    unsure: 'elec, electric, electrics, elecs, elettrica, electrica, electrique',
  },
  {
    written: 'Nylon Guitar',
    short: 'NyGt',
    forms: `(nylon|classical|class|spanish|konzert|flamenco|classic) ${guitar}, nylon string,
      ${guitar} (nylon|classical|classica|clasica|classique|criolla|espanola|flamenca), ny gt,
      nylon string ${guitar}`,
    unsure: 'nylon',
  },
  {
    written: '12 String Guitar',
    short: '12St',
    forms: `12 (string|str|st), 12 (string|str) ${guitar}, ${guitar} 12 (string|str),
      twelve string, twelve string ${guitar}, 12 saitige ${guitar}, (acoustic|ac|electric|elec) 12 string`,
  },
  {
    written: 'Baritone Guitar',
    short: 'BaGt',
    forms: `(baritone|bari|bariton) ${guitar}, ${guitar} baritone, ba gt`,
    unsure: 'baritone',
  },
  {
    written: 'Lap Steel',
    short: 'LpSt',
    forms: 'lap steel, lap steel guitar, lp st, lapsteel gtr',
  },
  {
    written: 'Pedal Steel',
    short: 'PdSt',
    forms: 'pedal steel, pedal steel guitar, pd st, ped steel, ped stl, steel guitar, steel gtr',
    unsure: 'steel',
  },
  {
    written: 'Resonator Guitar',
    short: 'Reso',
    forms: `resonator, resonator ${guitar}, reso, reso ${guitar}`,
  },
  { written: 'Banjo', short: 'Bnjo', forms: 'banjo, bnjo, bjo' },
  {
    written: 'Mandolin',
    short: 'Mand',
    forms: 'mandolin, mand, mando, mandoline, mandolina, mandolino, mdln',
  },
  { written: 'Ukulele', short: 'Uke', forms: 'ukulele, uke, ukelele, uku' },
  { written: 'Bouzouki', short: 'Bzk', forms: 'bouzouki, bzk, buzuki' },
  { written: 'Dulcimer', short: 'Dulc', forms: 'dulcimer, dulc, hackbrett' },
  { written: 'Koto', short: 'Koto', forms: 'koto' },
  { written: 'Oud', short: 'Oud', forms: 'oud' },
  { written: 'Sitar', short: 'Sitr', forms: 'sitar, sitr' },
  {
    written: 'Guitar',
    short: 'Gtr',
    forms: `${guitar}, guitars, guits, guitares, guitarras, chitarre`,
    misspelt: 'gutiar, giutar, guitr, guiatr, gitar, guitat, gtar, gutar, gtir',
    general: true,
  },
];
