import { useId, type ReactNode } from 'react';
import { describeFinding } from '#shared/findings/catalogue/describe-finding.ts';
import type { CheckReport, ReportEntry } from '#shared/report/check-report.ts';
import type { FileRole, SessionInformation } from '#shared/session/session-information.ts';
import { LevelIcon } from '../ui/level-mark.tsx';
import { Select } from '../ui/select.tsx';
import { TextInput } from '../ui/text-input.tsx';
import { fileName } from './file-name.ts';
import { repairDone } from './repair-words.ts';

const roleOptions: { value: FileRole; label: string }[] = [
  { value: 'track', label: 'Track' },
  { value: 'click', label: 'Click track' },
  { value: 'guide', label: 'Guide track' },
  { value: 'rough-mix', label: 'Rough mix' },
  { value: 'reference', label: 'Reference' },
  { value: 'note', label: 'Note' },
  { value: 'leave-out', label: 'Leave out' },
];

type PackingListProps = {
  report: CheckReport;
  /** Changes names and roles; without it the list can only be read. */
  onChange?: ((change: Partial<SessionInformation>) => void) | undefined;
};

/** What goes into the zip, from which file, changed how; and what stays at home. */
export function PackingList({ report, onChange }: PackingListProps) {
  const { entries, leftOut } = report.package;
  return (
    <div>
      <ul>
        {entries.map((entry) => (
          <EntryRow key={entry.to} entry={entry} report={report} onChange={onChange} />
        ))}
      </ul>
      {leftOut.length > 0 && (
        <section className="mt-5">
          <h3 className="mb-1 text-small font-semibold">Stays at home</h3>
          <ul className="text-small text-ink-2">
            {leftOut.map(({ path, reason }) => (
              <li key={path} className="flex flex-wrap items-center justify-between gap-3 py-1">
                <span>
                  {path}
                  {reasonWords[reason] && `: ${reasonWords[reason]}`}
                </span>
                {onChange && reason === 'chosen' && (
                  <RoleSelect path={path} report={report} onChange={onChange} />
                )}
              </li>
            ))}
          </ul>
        </section>
      )}
    </div>
  );
}

const reasonWords: Record<string, string> = {
  junk: 'a leftover of the system or of a program',
  'not-packable': 'not a file that is packed',
  duplicate: 'the same audio as another file',
};

function EntryRow({
  entry,
  report,
  onChange,
}: PackingListProps & { entry: ReportEntry }): ReactNode {
  const { from, to, repairs } = entry;
  const findings = report.package.findings.filter(
    ({ code, files }) => files.includes(to) && /^(name|number|export-leftover)/.test(code),
  );
  return (
    <li className="grid gap-x-4 gap-y-1.5 border-b border-line py-3 sm:grid-cols-[minmax(0,1fr)_minmax(0,1.2fr)_9rem]">
      <p className="min-w-0 self-center text-small text-ink-2">
        <span className="sr-only">From </span>
        {from.join(' + ')}
      </p>
      <div className="min-w-0">
        {onChange ? (
          <NameInput entry={entry} information={report.information} onChange={onChange} />
        ) : (
          <p className="font-medium">{to}</p>
        )}
        {repairs.length > 0 && (
          <p className="mt-1 text-small text-ink-2">
            {repairs.map((repair) => repairDone[repair]).join(', ')}
          </p>
        )}
        {findings.map((finding) => (
          <p key={finding.code} className="mt-1 flex items-baseline gap-1.5 text-small">
            <LevelIcon level={finding.level} sizePx={12} />
            {describeFinding(finding).what}
          </p>
        ))}
      </div>
      {onChange && from.length === 1 && (
        <RoleSelect path={from[0]!} report={report} onChange={onChange} />
      )}
    </li>
  );
}

/** A name by hand is never overwritten by a proposal; emptied, the proposal comes back. */
function NameInput({
  entry: { from, to },
  information,
  onChange,
}: {
  entry: ReportEntry;
  information: SessionInformation;
  onChange: (change: Partial<SessionInformation>) => void;
}): ReactNode {
  const id = useId();
  const path = from[0]!;
  const packed = fileName(to);
  return (
    <>
      <label htmlFor={id} className="sr-only">
        Name in the zip
      </label>
      <TextInput
        id={id}
        className="py-1 text-small font-medium"
        maxLength={200}
        defaultValue={information.names[path] ?? packed}
        // Read when the field is left: a name in the making is no name yet.
        onBlur={({ target }) => {
          const name = target.value.trim();
          if (name === (information.names[path] ?? packed)) return;
          const others = Object.fromEntries(
            Object.entries(information.names).filter(([named]) => named !== path),
          );
          onChange({ names: name === '' ? others : { ...others, [path]: name } });
        }}
        onKeyDown={(event) => {
          if (event.key === 'Enter') event.currentTarget.blur();
        }}
      />
    </>
  );
}

function RoleSelect({
  path,
  report,
  onChange,
}: {
  path: string;
  report: CheckReport;
  onChange: (change: Partial<SessionInformation>) => void;
}): ReactNode {
  const role = report.files.find((file) => file.path === path)?.role;
  return (
    <Select
      size="small"
      aria-label={`What ${path} is`}
      options={roleOptions}
      value={role}
      onChange={(chosen) => onChange({ roles: { ...report.information.roles, [path]: chosen } })}
    />
  );
}
