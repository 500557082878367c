import type { GroupNature, InstrumentGroup, NamingRules } from '#shared/rules/naming-rules.ts';

/** A typical part for each kind of group (common practice, no source). */
const typicalParts: Record<GroupNature, { instrument: string; detail: string; side: string }> = {
  drums: { instrument: 'Kick', detail: 'In', side: '' },
  percussion: { instrument: 'Tambourine', detail: '', side: '' },
  bass: { instrument: 'Bass', detail: 'DI', side: '' },
  guitars: { instrument: 'Guitar', detail: 'Rhythm', side: 'L' },
  keys: { instrument: 'Piano', detail: '', side: '' },
  synths: { instrument: 'Pad', detail: 'Warm', side: '' },
  orchestra: { instrument: 'Cello', detail: '', side: '' },
  vocals: { instrument: 'Lead Vocal', detail: '', side: '' },
  effects: { instrument: 'Riser', detail: '', side: '' },
};

/** How one name looks under these rules: `D Kick In`, `01_KICK_IN`. */
export function exampleName(naming: NamingRules, group: InstrumentGroup, position: number): string {
  const part = typicalParts[group.nature];
  const words = naming.tokens.map((token) => {
    switch (token) {
      case 'number':
        return String(position).padStart(naming.numberDigits, '0');
      case 'group':
        return naming.groupStyle === 'letter' ? group.letter : group.label;
      case 'instrument':
        return part.instrument;
      case 'detail':
        return part.detail;
      case 'side':
        return part.side;
    }
  });
  const name = words.filter((word) => word !== '').join(naming.separator);
  if (naming.case === 'upper') return name.toUpperCase();
  if (naming.case === 'lower') return name.toLowerCase();
  return name;
}

const tokenWords: Record<NamingRules['tokens'][number], string> = {
  number: 'a running number',
  group: 'the group',
  instrument: 'the instrument',
  detail: 'what tells it apart',
  side: 'L or R for a side',
};

const separatorWords: Record<NamingRules['separator'], string> = {
  ' ': 'spaces',
  _: 'underscores',
  '-': 'hyphens',
  '.': 'dots',
};

/** "The group, the instrument, what tells it apart, with spaces between them." */
export function patternWords(naming: NamingRules): string {
  const parts = naming.tokens.map((token) => tokenWords[token]).join(', then ');
  return `${parts.charAt(0).toUpperCase()}${parts.slice(1)}, with ${separatorWords[naming.separator]} between them.`;
}
