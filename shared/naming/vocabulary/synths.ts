import type { InstrumentEntry } from './entry.ts';

const synth = '(synth|syn|synthesizer|synthesiser|syth|snth|synthie|sintetizador|synthe|sy)';

export const synths: readonly InstrumentEntry[] = [
  {
    written: 'Synth Lead',
    short: 'SyLd',
    forms: `${synth} (lead|ld|leads), (lead|ld) ${synth}, sy ld, ${synth} solo, (saw|square|sine) lead`,
  },
  {
    written: 'Synth Strings',
    short: 'SySt',
    forms: `${synth} (strings|string|str), sy st, string machine, string ensemble synth`,
  },
  { written: 'Synth Brass', short: 'SyBr', forms: `${synth} (brass|horns|horn), sy br` },
  { written: 'Synth Choir', short: 'SyCh', forms: `${synth} (choir|vox|voice|voices), sy ch` },
  {
    written: 'Pad',
    short: 'Pad',
    forms: `pad, pads, ${synth} (pad|pads), pad ${synth}, padz`,
    unsure: 'pd',
    detail: 'Pad',
  },
  {
    written: 'Arp',
    short: 'Arp',
    forms: `arp, arps, ${synth} (arp|arps|arpeggio), (arp|arpeggio) ${synth}, arpeggio, arpeggiator,
      arpeggiated synth`,
    misspelt: 'aprs, arpegio, appreggio',
    detail: 'Arp',
  },
  {
    written: 'Pluck',
    short: 'Plck',
    forms: `pluck, plucks, plck, ${synth} (pluck|plucks|plk), (pluck|plucked) ${synth}, plk`,
    detail: 'Pluck',
  },
  {
    written: 'Stab',
    short: 'Stab',
    forms: `stab, stabs, ${synth} (stab|stabs), stab ${synth}, chord stab, chord stabs`,
    detail: 'Stab',
  },
  {
    written: 'Sequence',
    short: 'Seq',
    forms: `sequence, seq, ${synth} (seq|sequence), (seq|sequence) ${synth}, sequencer, sequenz, seqs`,
    detail: 'Sequence',
  },
  {
    written: 'Drone',
    short: 'Dron',
    forms: `drone, dron, drones, ${synth} drone, drone ${synth}`,
    detail: 'Drone',
  },
  {
    written: 'Synth',
    short: 'Syn',
    forms: `${synth}, synths, syns, synthesizers, poly ${synth}, mono ${synth}, modular, analog ${synth},
      analogue ${synth}, synth poly, synth line, synth chords`,
    misspelt: 'snyth, sinth, synht, sytnh, synt',
    general: true,
  },
];
