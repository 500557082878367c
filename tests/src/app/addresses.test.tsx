import { act, render, screen } from '@testing-library/react';
import { z } from 'zod';
import { afterEach, describe, expect, it } from 'vitest';
import '../../../src/app/zod-jitless.ts';
import { forgetLinkToken, takeLinkTokens, useLinkToken } from '../../../src/app/link-token.ts';
import { safeNextPath, signInPath } from '../../../src/app/next-path.ts';
import { homePath } from '../../../src/app/home-path.ts';
import { slugFrom } from '../../../src/routes/studio/slug-from.ts';
import { slugSchema } from '#shared/api/fields.ts';

describe('the way back after signing in', () => {
  it('returns to the page and its query', () => {
    const path = signInPath({ pathname: '/projects/1', search: '?tab=songs' });
    expect(safeNextPath(new URL(path, 'http://x').search)).toBe('/projects/1?tab=songs');
  });

  it.each([
    '//evil.example',
    '/\\evil.example',
    '/\t/evil.example',
    'https://evil.example',
    'javascript:alert(1)',
    'evil.example',
    '',
  ])('never leads to another site: %s', (next) => {
    const path = safeNextPath(`?next=${encodeURIComponent(next)}`);
    if (path !== undefined) {
      expect(new URL(path, 'https://ours.example').origin).toBe('https://ours.example');
      expect(path.startsWith('//')).toBe(false);
    }
  });

  it('is nowhere when nothing was asked', () => {
    expect(safeNextPath('')).toBeUndefined();
  });
});

describe('homePath', () => {
  it('is the studio for those who have one', () => {
    const studio = { id: 'a', slug: 'harbour-lane-mixing', name: 'Harbour Lane', role: 'owner' };
    expect(homePath({ user: null, studios: [studio as never] })).toBe(
      '/studio/harbour-lane-mixing',
    );
    expect(homePath({ user: null, studios: [] })).toBe('/my/checks');
  });
});

function ShowToken() {
  return <p>{useLinkToken('/confirm') ?? 'none'}</p>;
}

describe('the secret of a mailed link', () => {
  afterEach(() => {
    act(() => {
      forgetLinkToken('/confirm');
    });
    window.history.replaceState(null, '', '/');
  });

  it('is taken out of the address before anything is drawn', () => {
    window.history.replaceState(null, '', '/confirm?from=mail#token=secret-1');
    takeLinkTokens();
    expect(window.location.href).toBe('http://localhost:3000/confirm?from=mail');
    render(<ShowToken />);
    expect(screen.getByText('secret-1')).toBeInTheDocument();
  });

  it('is taken again when another link is opened in the same tab', () => {
    window.history.replaceState(null, '', '/confirm');
    takeLinkTokens();
    render(<ShowToken />);
    window.history.replaceState(null, '', '/confirm#token=secret-2');
    act(() => {
      window.dispatchEvent(new Event('hashchange'));
    });
    expect(window.location.hash).toBe('');
    expect(screen.getByText('secret-2')).toBeInTheDocument();
  });

  it('leaves other fragments and other pages alone', () => {
    window.history.replaceState(null, '', '/check#token=not-ours');
    takeLinkTokens();
    expect(window.location.hash).toBe('#token=not-ours');
  });
});

describe('slugFrom', () => {
  it.each([
    ['Harbour Lane Mixing', 'harbour-lane-mixing'],
    ['Café Äther & Söhne', 'cafe-ather-sohne'],
    ["Maren's Room", 'marens-room'],
    ['  --- 24 bit!  ', '24-bit'],
  ])('proposes for %s what the contract accepts', (name, slug) => {
    expect(slugFrom(name)).toBe(slug);
    expect(slugSchema.safeParse(slugFrom(name)).success).toBe(true);
  });

  it('stays within 40 characters and never ends in a hyphen', () => {
    const slug = slugFrom('A studio whose name goes on and on and on forever');
    expect(slug.length).toBeLessThanOrEqual(40);
    expect(slugSchema.safeParse(slug).success).toBe(true);
  });

  it('proposes nothing where there is no Latin letter', () => {
    expect(slugFrom('スタジオ')).toBe('');
  });
});

describe('zod', () => {
  it('compiles nothing from strings once the setting is made', () => {
    expect(z.config().jitless).toBe(true);
  });
});
