import { render, screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { Figure } from '../../../src/ui/figure.tsx';
import { LevelMark, levelWords, type Level } from '../../../src/ui/level-mark.tsx';
import { ErrorNotice } from '../../../src/ui/states.tsx';
import { Strip, StripSheet } from '../../../src/ui/strip.tsx';
import { Table } from '../../../src/ui/table.tsx';
import { TapeLabel } from '../../../src/ui/tape-label.tsx';

describe('TapeLabel', () => {
  it('keeps a long name whole, for reading and for pointing', () => {
    const name = 'Velvet Tramline - Salt on the Windows - 112 BPM.zip';
    render(<TapeLabel name={name} />);
    expect(screen.getByText(name)).toHaveAttribute('title', name);
  });

  it('is torn the same way for the same name', () => {
    const tears = ['D Kick In', 'D Kick In'].map((name) => {
      const { container } = render(<TapeLabel name={name} />);
      return container.querySelector('.tape')?.getAttribute('data-tear');
    });
    expect(tears[0]).toBe(tears[1]);
  });
});

describe('LevelMark', () => {
  it.each(Object.entries(levelWords) as [Level, string][])(
    'says %s in words beside a shape that screen readers pass over',
    (level, words) => {
      const { container } = render(<LevelMark level={level} />);
      expect(container).toHaveTextContent(words);
      expect(container.querySelector('svg')).toHaveAttribute('aria-hidden', 'true');
    },
  );

  it('has a shape of its own for every level', () => {
    const shapes = (Object.keys(levelWords) as Level[]).map((level) => {
      const { container } = render(<LevelMark level={level} />);
      return container.querySelector('path')?.getAttribute('d');
    });
    expect(new Set(shapes).size).toBe(shapes.length);
  });
});

describe('Figure', () => {
  it('keeps number and unit together and writes a minus sign', () => {
    const { container } = render(<Figure value={-11.2} unit="dBFS" />);
    expect(container).toHaveTextContent('−11.2 dBFS');
  });
});

describe('Strip', () => {
  it('shows the name on tape, the detail and the lane', () => {
    render(
      <StripSheet>
        <Strip name="D Kick In" detail="Track 01 (3) KikIn">
          <span>wave</span>
        </Strip>
      </StripSheet>,
    );
    for (const words of ['D Kick In', 'Track 01 (3) KikIn', 'wave'])
      expect(screen.getByText(words)).toBeInTheDocument();
  });
});

describe('Table', () => {
  it('names its rows and columns', () => {
    render(
      <Table
        caption="Tracks"
        rows={[{ name: 'D Kick In', peak: -6.2 }]}
        rowKey={(row) => row.name}
        columns={[
          { key: 'name', header: 'Track', rowHeader: true, cell: (row) => row.name },
          { key: 'peak', header: 'Peak', numeric: true, cell: (row) => row.peak },
        ]}
      />,
    );
    const table = screen.getByRole('table', { name: 'Tracks' });
    expect(within(table).getByRole('columnheader', { name: 'Peak' })).toBeInTheDocument();
    expect(within(table).getByRole('rowheader', { name: 'D Kick In' })).toBeInTheDocument();
  });
});

describe('ErrorNotice', () => {
  it('is announced and gives the number to quote', () => {
    render(
      <ErrorNotice title="Something broke." requestId="request-7">
        Try again.
      </ErrorNotice>,
    );
    expect(screen.getByRole('alert')).toHaveTextContent(
      'Something broke.Try again.Request request-7',
    );
  });
});
