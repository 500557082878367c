import type { InstrumentEntry } from './entry.ts';

const sax = '(sax|saxophone|saxophon|saxo|saxofon|sassofono|sx)';

export const orchestra: readonly InstrumentEntry[] = [
  {
    written: 'Violin',
    short: 'Vln',
    forms:
      'violin, vln, violine, violon, violino, geige, geigen, fiddle, violins, vlns, vlin, violines, violini, violons',
    misspelt: 'voilin, violn, vilion',
    unsure: 'vl, vn, vio, fid',
  },
  {
    written: 'Viola',
    short: 'Vla',
    forms: 'viola, vla, bratsche, bratschen, viole',
    misspelt: 'voila, viloa',
  },
  {
    written: 'Cello',
    short: 'Clo',
    forms: 'cello, celli, clo, vlc, violoncello, violoncelle, violonchelo, violoncelli, cll, chelo',
    misspelt: 'chello, celo, cellp',
    unsure: 'vc',
  },
  {
    written: 'String Quartet',
    short: 'SQt',
    forms: 'string quartet, s qt, str quartet, streichquartett, quatuor a cordes',
  },
  { written: 'Harp', short: 'Harp', forms: 'harp, harfe, harpe, arpa', unsure: 'hrp' },
  {
    written: 'Trumpet',
    short: 'Tpt',
    forms: 'trumpet, tpt, trp, trpt, trompete, trompette, trompeta, tromba, trmpt',
    misspelt: 'trupmet, trumpt, trunpet',
    unsure: 'tp, trmp',
  },
  {
    written: 'Flugelhorn',
    short: 'Flgh',
    forms: 'flugelhorn, flugel horn, fluegelhorn, flgh, flug',
  },
  {
    written: 'Trombone',
    short: 'Tbn',
    forms: 'trombone, tbn, trb, trbn, posaune, trombon, tromb',
    misspelt: 'tromboen, trombne',
    unsure: 'tb, bone, bones',
  },
  { written: 'Bass Trombone', short: 'BTbn', forms: 'bass trombone, b tbn, bass tbn' },
  {
    written: 'French Horn',
    short: 'FrHn',
    forms: 'french horn, fr hn, fr horn, f horn, waldhorn',
    unsure: 'fhn, hn, cor',
  },
  { written: 'Tuba', short: 'Tuba', forms: 'tuba, sousaphone, sousaphon, sousafon' },
  { written: 'Alto Sax', short: 'ASax', forms: `(alto|a|alt) ${sax}, ${sax} (alto|alt)` },
  { written: 'Tenor Sax', short: 'TSax', forms: `(tenor|ten|t|tnr) ${sax}, ${sax} (tenor|ten)` },
  {
    written: 'Baritone Sax',
    short: 'BSax',
    forms: `(baritone|bari|b|bar|bariton) ${sax}, ${sax} (bari|baritone)`,
  },
  {
    written: 'Soprano Sax',
    short: 'SSax',
    forms: `(soprano|sop|s|sopran) ${sax}, ${sax} (soprano|sop)`,
  },
  {
    written: 'Saxophone',
    short: 'Sax',
    forms: '(sax|saxophone|saxophon|saxo|saxofon|sassofono), saxes, saxophones, saxos',
    misspelt: 'saxaphone, saxphone',
  },
  { written: 'Bass Clarinet', short: 'BCl', forms: 'bass clarinet, b cl, bass klarinette, b clar' },
  {
    written: 'Clarinet',
    short: 'Clar',
    forms: 'clarinet, clar, klarinette, clarinette, clarinete, clarinetto, clrnt, cla',
    misspelt: 'clarinette, clairinet',
    unsure: 'cl',
  },
  { written: 'Piccolo', short: 'Picc', forms: 'piccolo, picc, piccolo flute' },
  {
    written: 'Flute',
    short: 'Flt',
    forms:
      'flute, flt, floete, flote, quer floete, querflote, flauta, flauto, fluete, alto flute, bass flute',
    misspelt: 'flut, fulte',
    unsure: 'fl',
  },
  { written: 'Oboe', short: 'Obo', forms: 'oboe, hautbois, obo', unsure: 'ob' },
  { written: 'English Horn', short: 'EHn', forms: 'english horn, cor anglais, e hn, engl horn' },
  { written: 'Bassoon', short: 'Bsn', forms: 'bassoon, bsn, fagott, basson, fagot, fagotto' },
  { written: 'Recorder', short: 'Rcdr', forms: 'recorder, rcdr, blockfloete, blockflote' },
  {
    written: 'Tin Whistle',
    short: 'TWst',
    forms: 'tin whistle, penny whistle, t wst, low whistle',
  },
  {
    written: 'Bagpipes',
    short: 'Bagp',
    forms: 'bagpipes, bagpipe, bag pipes, bagp, dudelsack, gaita',
  },
  {
    written: 'Harmonica',
    short: 'Hca',
    forms: 'harmonica, hca, mundharmonika, mouth organ, blues harp, armonica, harmonika',
    misspelt: 'harmonicca',
    unsure: 'harmon',
  },
  {
    written: 'Timpani',
    short: 'Timp',
    forms: 'timpani, timp, pauke, pauken, timbales orchestre, kettle drum',
    misspelt: 'tympani, timpany',
  },
  {
    written: 'Woodwinds',
    short: 'WW',
    forms: 'woodwinds, wood winds, woodwind, ww, winds, holzblaeser, maderas',
    general: true,
  },
  {
    written: 'Horns',
    short: 'Hns',
    forms: 'horns, horn section, hns, hrns, blaeser, vientos, fiati, horn sect',
    unsure: 'horn, hrn, vents',
    general: true,
  },
  {
    written: 'Brass',
    short: 'Brs',
    forms: 'brass, brass section, brs, cuivres, ottoni, metales, blechblaeser, brass band',
    general: true,
  },
  {
    written: 'Strings',
    short: 'Str',
    forms:
      'strings, string section, strs, streicher, cordes, cuerdas, archi, strngs, string, stgs, string ensemble',
    misspelt: 'stirngs, srtings',
    unsure: 'str, stg, cuerda',
    general: true,
  },
  {
    written: 'Orchestra',
    short: 'Orch',
    forms: 'orchestra, orch, orchester, orchestre, orquesta, full orchestra, orchestral',
    unsure: 'tutti',
    general: true,
  },
];
