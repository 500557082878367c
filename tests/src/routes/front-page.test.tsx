import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { MemoryRouter } from 'react-router-dom';
import { beforeEach, describe, expect, it } from 'vitest';
import { FrontPage } from '../../../src/routes/front/front-page.tsx';
import { illustratedSet } from '../../../src/routes/front/illustrated-set.ts';
import { waveOutline } from '../../../src/routes/front/wave-outline.ts';

describe('the front page', () => {
  beforeEach(() => {
    render(
      <MemoryRouter>
        <FrontPage />
      </MemoryRouter>,
    );
  });

  it('says what it is and offers both ways on', () => {
    expect(screen.getByRole('heading', { level: 1 })).toHaveTextContent(
      'Multitracks, packed right before they travel.',
    );
    expect(screen.getByRole('link', { name: 'Check a folder now' })).toHaveAttribute(
      'href',
      '/check',
    );
    expect(screen.getByRole('link', { name: 'For engineers' })).toHaveAttribute(
      'href',
      '/#engineers',
    );
    expect(screen.getByText(/Nothing is uploaded/)).toBeInTheDocument();
  });

  it('says that no findings are no guarantee', () => {
    expect(screen.getByRole('heading', { name: /is no guarantee/ })).toBeInTheDocument();
  });

  it('shows the example before and after, and what only the artist can mend', async () => {
    const example = screen.getByRole('region', { name: 'Salt on the Windows' });
    expect(within(example).getByTitle('Track 01 (3) KikIn')).toBeInTheDocument();
    await userEvent.click(within(example).getByRole('radio', { name: 'As packed' }));
    expect(within(example).queryByTitle('Track 01 (3) KikIn')).toBeNull();
    expect(within(example).getByTitle('D Kick In')).toBeInTheDocument();
    expect(within(example).getByText('must fix')).toBeInTheDocument();
    expect(within(example).getByText('left out')).toBeInTheDocument();
  });
});

describe('waveOutline', () => {
  it('stays in its box of 1000 by 40 and closes', () => {
    for (const [index, strip] of illustratedSet.entries()) {
      const path = waveOutline(strip, index);
      const numbers = (path.match(/[\d.]+ [\d.]+/g) ?? []).map((pair) =>
        pair.split(' ').map(Number),
      );
      expect(numbers.length).toBeGreaterThan(100);
      for (const [x = -1, y = -1] of numbers) {
        expect(x >= 0 && x <= 1000 && y >= 0 && y <= 40).toBe(true);
      }
      expect(path.endsWith('Z')).toBe(true);
    }
  });
});
