import { useMemo } from 'react';
import { describeFinding } from '#shared/findings/catalogue/describe-finding.ts';
import { levels, type Finding, type FindingCode } from '#shared/findings/finding.ts';
import { Button } from '../ui/button.tsx';
import { levelWords } from '../ui/level-mark.tsx';
import { Select } from '../ui/select.tsx';
import { fileName } from './file-name.ts';
import { isFiltered, noFilter, type FindingFilter } from './finding-filter.ts';

type FindingFilterBarProps = {
  findings: readonly Finding[];
  /** How many the filter leaves. */
  shown: number;
  filter: FindingFilter;
  onFilter: (filter: FindingFilter) => void;
};

/** Stands for "whatever it is": a list needs a value that no file has. */
const any = '*';

const counted = (words: string, count: number): string => `${words} (${String(count)})`;

/** Levels, files and kinds of finding to choose from, each with how many there are. */
export function FindingFilterBar({ findings, shown, filter, onFilter }: FindingFilterBarProps) {
  const { byLevel, byPath, byCode, titles } = useMemo(() => countFindings(findings), [findings]);
  return (
    <div className="border-b border-line px-5 py-3 print:hidden">
      <div className="grid grid-cols-3 gap-2">
        <Select
          size="small"
          aria-label="Level of the findings shown"
          value={filter.level ?? any}
          onChange={(level) => onFilter({ ...filter, level: level === any ? null : level })}
          options={[
            { value: any, label: 'Any level' },
            ...levels
              .filter((level) => byLevel.has(level))
              .map((value) => ({
                value,
                label: counted(levelWords[value], byLevel.get(value) ?? 0),
              })),
          ]}
        />
        <Select
          size="small"
          aria-label="File of the findings shown"
          value={filter.path ?? any}
          onChange={(path) => onFilter({ ...filter, path: path === any ? null : path })}
          options={[
            { value: any, label: 'Any file' },
            ...[...byPath].map(([path, count]) => ({
              value: path,
              label: counted(fileName(path), count),
            })),
          ]}
        />
        <Select
          size="small"
          aria-label="Kind of the findings shown"
          value={filter.code ?? any}
          onChange={(code) => onFilter({ ...filter, code: code === any ? null : code })}
          options={[
            { value: any, label: 'Any kind' },
            ...[...byCode].map(([code, count]) => ({
              value: code,
              label: counted(titles.get(code) ?? code, count),
            })),
          ]}
        />
      </div>
      <p
        role="status"
        className={isFiltered(filter) ? 'mt-2 flex items-center gap-3 text-small' : ''}
      >
        {isFiltered(filter) && (
          <>
            {shown} of {findings.length} findings shown.
            <Button size="small" kind="quiet" onClick={() => onFilter(noFilter)}>
              Show all
            </Button>
          </>
        )}
      </p>
    </div>
  );
}

function count<Key>(counts: Map<Key, number>, key: Key): void {
  counts.set(key, (counts.get(key) ?? 0) + 1);
}

function countFindings(findings: readonly Finding[]) {
  const byLevel = new Map<Finding['level'], number>();
  const byPath = new Map<string, number>();
  const byCode = new Map<FindingCode, number>();
  const titles = new Map<FindingCode, string>();
  for (const finding of findings) {
    count(byLevel, finding.level);
    count(byCode, finding.code);
    for (const path of finding.files) count(byPath, path);
    if (!titles.has(finding.code)) titles.set(finding.code, kindWords(finding));
  }
  const files = [...byPath].sort(([a], [b]) => fileName(a).localeCompare(fileName(b), 'en'));
  return { byLevel, byPath: new Map(files), byCode, titles };
}

/** A kind in a few words: a code says it, without the numbers of one finding's title. */
function kindWords(finding: Finding): string {
  const { title } = describeFinding(finding);
  return /\d/.test(title) ? codeWords(finding.code) : title;
}

function codeWords(code: FindingCode): string {
  const words = code.replaceAll('-', ' ');
  return words.charAt(0).toUpperCase() + words.slice(1);
}
