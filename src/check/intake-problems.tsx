import type { IntakeProblem } from './bench-state.ts';

/** What was dropped and could not be taken in, a line each. */
export function IntakeProblems({ problems }: { problems: readonly IntakeProblem[] }) {
  if (problems.length === 0) return null;
  return (
    <div role="note" className="px-4 pb-4 text-small sm:px-7">
      <p className="font-medium">Not taken in:</p>
      <ul className="list-disc ps-5 text-ink-2">
        {problems.map(({ path, reason }) => (
          <li key={`${path} ${reason}`}>
            {path}: {reason}
          </li>
        ))}
      </ul>
    </div>
  );
}
