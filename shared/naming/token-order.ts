import type { NameToken } from '../rules/naming-rules.ts';
import type { NameSpan } from './parsed-name.ts';

/**
 * Which token of a convention a piece of a name belongs to. A side without a token of its own goes
 * with the details, and details without one with the instrument. null: a piece that no convention
 * has a place for (what exports leave behind).
 */
export function tokenOf(span: NameSpan, tokens: readonly NameToken[]): NameToken | null {
  const details: NameToken = tokens.includes('detail') ? 'detail' : 'instrument';
  switch (span.kind) {
    case 'number':
    case 'group':
    case 'instrument':
      return span.kind;
    case 'side':
      return tokens.includes('side') ? 'side' : details;
    case 'detail':
    case 'take':
    case 'role':
    case 'unknown':
      return details;
    case 'ordinal':
      return 'instrument';
    case 'copy':
    case 'counter':
    case 'export-word':
    case 'version':
    case 'date':
    case 'tempo':
    case 'key':
    case 'format':
    case 'artist':
    case 'title':
      return null;
  }
}

type Placed = { span: NameSpan; token: NameToken };

/**
 * The first piece that stands in the wrong place; null: all in order. Of two that stand the wrong
 * way round it is the one that is not the instrument, for the instrument is what people look for.
 */
export function firstOutOfOrder(
  spans: readonly NameSpan[],
  tokens: readonly NameToken[],
): Placed | null {
  let furthest: Placed | null = null;
  for (const span of spans) {
    const token = tokenOf(span, tokens);
    if (token === null || !tokens.includes(token)) continue;
    const placed = { span, token };
    if (furthest && tokens.indexOf(token) < tokens.indexOf(furthest.token)) {
      return token === 'instrument' ? furthest : placed;
    }
    furthest = placed;
  }
  return null;
}

export function followsOrder(spans: readonly NameSpan[], tokens: readonly NameToken[]): boolean {
  return firstOutOfOrder(spans, tokens) === null;
}
