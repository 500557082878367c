import { useId, useState, type ReactNode } from 'react';
import { describeFinding, nextStep } from '#shared/findings/catalogue/describe-finding.ts';
import { nextSteps, type NextStep } from '#shared/findings/catalogue/definition.ts';
import { levels, type Finding, type Level, type RepairKind } from '#shared/findings/finding.ts';
import { chooseRepair } from '#shared/repair/choose-repairs.ts';
import type { ChosenRepair } from '#shared/repair/repair-plan.ts';
import { answerKinds, type AnswerKind } from '#shared/session/session-information.ts';
import { Button } from '../ui/button.tsx';
import { LevelIcon, levelWords } from '../ui/level-mark.tsx';
import { Menu, MenuItem } from '../ui/menu.tsx';
import { TapeLabel } from '../ui/tape-label.tsx';
import { answerWords } from './answers.ts';
import { useBenchHere } from './bench-context.ts';
import { CloseUp } from './close-up.tsx';
import { fileName } from './file-name.ts';
import { repairWords, takenWords } from './repair-words.ts';
import { clockTime } from './time-axis.ts';
import { allFindings, findingKey, type ViewedSession } from './viewed-session.ts';

/** Headings of the groups, in the order in which things are best done. */
const stepHeadings: Record<NextStep, string> = {
  'we-can-fix': 'We can fix',
  'export-again': 'Export again',
  decide: 'To decide',
  know: 'Good to know',
};

const stepOrder: readonly NextStep[] = ['we-can-fix', 'export-again', 'decide', 'know'];

type FindingsPanelProps = {
  view: ViewedSession;
  chosen?: readonly ChosenRepair[];
  onChoose?: ((repairs: readonly ChosenRepair[]) => void) | undefined;
  onUndo?: ((repairs: readonly ChosenRepair[]) => void) | undefined;
  onAnswer?: ((finding: Finding, answer: AnswerKind | null) => void) | undefined;
};

/** All findings, grouped by what somebody does next about them. */
export function FindingsPanel(props: FindingsPanelProps) {
  const findings = allFindings(props.view);
  if (findings.length === 0) {
    return (
      <p className="px-5 py-6 text-ink-2">
        None of these checks found anything. That is no guarantee: ears still decide.
      </p>
    );
  }
  return stepOrder.map((step) => {
    const group = findings.filter((finding) => nextStep(finding) === step);
    return group.length > 0 && <FindingGroup key={step} step={step} group={group} {...props} />;
  });
}

function FindingGroup({
  step,
  group,
  ...props
}: FindingsPanelProps & { step: NextStep; group: Finding[] }): ReactNode {
  const headingId = useId();
  return (
    <section aria-labelledby={headingId}>
      <header className="flex items-baseline justify-between border-b border-line bg-paper px-5 py-3">
        <h2 id={headingId} className="text-small font-semibold text-ink-2">
          {stepHeadings[step]}
        </h2>
        <span className="figures text-small text-ink-2">{group.length}</span>
      </header>
      <ul>
        {group.map((finding) => (
          <FindingItem key={findingKey(finding)} finding={finding} {...props} />
        ))}
      </ul>
    </section>
  );
}

function FindingItem({
  finding,
  view,
  chosen = [],
  onChoose,
  onUndo,
  onAnswer,
}: FindingsPanelProps & { finding: Finding }): ReactNode {
  const { title, what, why, how } = describeFinding(finding);
  const taken = chosen.find((repair) => answersFinding(repair, finding));
  return (
    <li
      id={anchorOf(finding)}
      tabIndex={-1}
      className={`flex gap-3 border-b border-line px-5 py-4 target:bg-wash ${taken ? 'bg-wash' : ''}`}
    >
      <LevelIcon level={finding.level} className="mt-1" />
      <div className="min-w-0 flex-1">
        <h3 className="font-semibold">
          <span className="sr-only">{levelWords[finding.level]}: </span>
          {title}
        </h3>
        <Place finding={finding} view={view} />
        <p className="mt-1.5 text-ink-2">{what}</p>
        <details className="mt-1 text-small text-ink-2">
          <summary className="cursor-pointer py-1 text-ink underline-offset-4 hover:underline">
            Why, and how to mend it
          </summary>
          <p className="mt-1">{why}</p>
          <p className="mt-1">{how}</p>
        </details>
        <Listening finding={finding} view={view} />
        {finding.answer !== null && (
          <p className="mt-2 flex flex-wrap items-center gap-2 text-small">
            <span className="font-medium">
              You said: {answerWords[finding.answer].toLowerCase()}.
            </span>
            {onAnswer && (
              <Button size="small" kind="quiet" onClick={() => onAnswer(finding, null)}>
                Take it back
              </Button>
            )}
          </p>
        )}
        {onChoose && (
          <div className="mt-3 flex flex-wrap items-center gap-2">
            {taken ? (
              <>
                <span className="text-small font-medium text-case">{takenWords[taken.repair]}</span>
                <Button size="small" onClick={() => onUndo?.([taken])}>
                  Undo
                </Button>
              </>
            ) : (
              finding.repairs.map((repair: RepairKind, index) => (
                <Button
                  key={repair}
                  size="small"
                  kind={index === 0 ? 'primary' : 'plain'}
                  onClick={() => onChoose([chooseRepair(finding, repair)])}
                >
                  {repairWords[repair]}
                </Button>
              ))
            )}
            {onAnswer && !taken && finding.answer === null && finding.level !== 'note' && (
              <AnswerMenu onAnswer={(answer) => onAnswer(finding, answer)} />
            )}
          </div>
        )}
      </div>
    </li>
  );
}

/** The close-up of a finding that has places, where the files are at hand. */
function Listening({ finding, view }: { finding: Finding; view: ViewedSession }): ReactNode {
  const bench = useBenchHere();
  const [shown, setShown] = useState(false);
  const [path] = finding.files;
  const format = view.files.find((file) => file.path === path)?.format;
  if (!bench || path === undefined || !format || finding.ranges.length === 0) return null;
  if (!shown) {
    return (
      <Button size="small" kind="quiet" className="mt-1 -ms-3" onClick={() => setShown(true)}>
        Look closer and listen
      </Button>
    );
  }
  return (
    <>
      <CloseUp bench={bench} finding={finding} path={path} sampleRateHz={format.sampleRateHz} />
      {loudCodes.has(finding.code) && (
        <p className="mt-1 text-micro text-ink-2">Turn the volume down before you listen.</p>
      )}
    </>
  );
}

/** Findings whose sound can startle. */
const loudCodes: ReadonlySet<Finding['code']> = new Set([
  'clipped',
  'flat-tops',
  'over-full-scale',
  'starts-on-sound',
  'ends-on-sound',
  'dropout',
  'not-a-number',
]);

function AnswerMenu({ onAnswer }: { onAnswer: (answer: AnswerKind) => void }): ReactNode {
  return (
    <Menu align="start" trigger={<Button size="small">Answer</Button>}>
      {answerKinds.map((answer) => (
        <MenuItem key={answer} onSelect={() => onAnswer(answer)}>
          {answerWords[answer]}
        </MenuItem>
      ))}
    </Menu>
  );
}

/** Which files, and where the first place is. */
function Place({ finding, view }: { finding: Finding; view: ViewedSession }): ReactNode {
  const [path] = finding.files;
  const file = view.files.find((candidate) => candidate.path === path);
  const [first] = finding.ranges;
  const rate = file?.format?.sampleRateHz;
  const more = finding.places > 1 ? ' and on' : '';
  return (
    <p className="mt-1 flex flex-wrap items-center gap-x-3 gap-y-1 text-small">
      {finding.files.slice(0, 3).map((name) => (
        <TapeLabel key={name} name={fileName(name)} size="small" />
      ))}
      {finding.files.length > 3 && (
        <span className="text-ink-2">and {finding.files.length - 3} more</span>
      )}
      {first && rate !== undefined && (
        <span className="figures text-ink-2">
          {clockTime(first.startFrame / rate, true)}
          {more}
        </span>
      )}
    </p>
  );
}

/** Whether a taken repair is the answer to this finding. */
function answersFinding(repair: ChosenRepair, finding: Finding): boolean {
  return (
    repair.code === finding.code &&
    repair.files.length === finding.files.length &&
    repair.files.every((path, index) => path === finding.files[index])
  );
}

/** Where the picture's marks lead: an id made of the finding's own key. */
export function anchorOf({ code, files }: Pick<Finding, 'code' | 'files'>): string {
  return `finding-${code}-${files.join('-').replace(/[^A-Za-z0-9]+/g, '-')}`;
}

/** "2 to export again, 3 we can fix, 2 to decide": what there is to do, in a line. */
export function stepCounts(
  view: ViewedSession,
): { step: NextStep; count: number; words: string; level: Level }[] {
  const findings = allFindings(view);
  const words: Record<NextStep, string> = {
    'export-again': 'to export again',
    'we-can-fix': 'we can fix',
    decide: 'to decide',
    know: 'good to know',
  };
  return nextSteps.flatMap((step) => {
    const group = findings.filter((finding) => nextStep(finding) === step);
    const level = levels.find((candidate) => group.some((finding) => finding.level === candidate));
    return level ? [{ step, count: group.length, words: words[step], level }] : [];
  });
}
