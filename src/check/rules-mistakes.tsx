import { AppError } from '#shared/errors.ts';
import type { RulesIssue } from '#shared/rules/parse-house-rules.ts';
import { ErrorPanel } from '../app/error-panel.tsx';
import { errorText } from '../app/error-text.ts';
import { ErrorNotice } from '../ui/states.tsx';

/** A failure to read house rules: every mistake with its place; other failures as anywhere. */
export function RulesMistakes({ failure }: { failure: unknown }) {
  const issues = issuesOf(failure);
  if (!issues) return <ErrorPanel error={failure} />;
  const { title } = errorText(failure);
  return (
    <ErrorNotice title={title}>
      <ul className="list-disc ps-5">
        {issues.map(({ path, message }) => (
          <li key={`${path} ${message}`}>
            <span className="figures text-ink">{path === '' ? 'The file' : path}</span> {message}
          </li>
        ))}
      </ul>
    </ErrorNotice>
  );
}

function issuesOf(failure: unknown): RulesIssue[] | null {
  if (!(failure instanceof AppError) || failure.code !== 'rules-invalid') return null;
  return failure.details['issues'] as RulesIssue[];
}
