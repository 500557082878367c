import { Figure } from '../../ui/figure.tsx';
import { Table } from '../../ui/table.tsx';
import { TapeLabel } from '../../ui/tape-label.tsx';

const rows = [
  {
    name: 'D Kick In',
    lengthSeconds: '205.714',
    peakDbfs: '-6.2',
    rmsDbfs: '-19.8',
    bytes: '29.6',
  },
  {
    name: 'B Bass DI',
    lengthSeconds: '205.314',
    peakDbfs: '-9.7',
    rmsDbfs: '-18.1',
    bytes: '29.5',
  },
  {
    name: 'V Lead Vocal',
    lengthSeconds: '205.714',
    peakDbfs: '-11.2',
    rmsDbfs: '-24.4',
    bytes: '29.6',
  },
];

/** Measures of three tracks. */
export function TableSample() {
  return (
    <Table
      caption="Measures of three tracks"
      rows={rows}
      rowKey={(row) => row.name}
      columns={[
        {
          key: 'name',
          header: 'Track',
          rowHeader: true,
          cell: (row) => <TapeLabel name={row.name} size="small" />,
        },
        {
          key: 'length',
          header: 'Length',
          numeric: true,
          cell: (row) => <Figure value={row.lengthSeconds} unit="s" />,
        },
        {
          key: 'peak',
          header: 'Peak',
          numeric: true,
          cell: (row) => <Figure value={row.peakDbfs} unit="dBFS" />,
        },
        {
          key: 'rms',
          header: 'Mean level',
          numeric: true,
          cell: (row) => <Figure value={row.rmsDbfs} unit="dBFS" />,
        },
        {
          key: 'bytes',
          header: 'Size',
          numeric: true,
          cell: (row) => <Figure value={row.bytes} unit="MB" />,
        },
      ]}
    />
  );
}
