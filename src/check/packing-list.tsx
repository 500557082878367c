import type { CheckReport } from '#shared/report/check-report.ts';

/** What goes into the zip, from which file, changed how; and what stays at home. */
export function PackingList({ report }: { report: CheckReport }) {
  const { entries, leftOut } = report.package;
  return (
    <div className="overflow-x-auto">
      <table className="w-full text-small">
        <thead>
          <tr className="border-b border-line text-start text-ink-2">
            <th scope="col" className="py-2 pe-4 text-start font-medium">
              From
            </th>
            <th scope="col" className="py-2 pe-4 text-start font-medium">
              In the zip
            </th>
            <th scope="col" className="py-2 text-start font-medium">
              Repairs
            </th>
          </tr>
        </thead>
        <tbody>
          {entries.map(({ from, to, repairs }) => (
            <tr key={to} className="border-b border-line align-top">
              <td className="py-2 pe-4 text-ink-2">{from.join(' + ')}</td>
              <td className="py-2 pe-4 font-medium">{to}</td>
              <td className="py-2">
                {repairs.map((repair) => repair.replaceAll('-', ' ')).join(', ')}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {leftOut.length > 0 && (
        <p className="mt-4 text-small text-ink-2">
          Left out: {leftOut.map(({ path }) => path).join(', ')}
        </p>
      )}
    </div>
  );
}
