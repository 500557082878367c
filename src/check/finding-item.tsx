import type { ReactNode } from 'react';
import { describeFinding } from '#shared/findings/catalogue/describe-finding.ts';
import type { Finding, RepairKind } from '#shared/findings/finding.ts';
import { chooseRepair } from '#shared/repair/choose-repairs.ts';
import type { ChosenRepair } from '#shared/repair/repair-plan.ts';
import { answerKinds, type AnswerKind } from '#shared/session/session-information.ts';
import { Button } from '../ui/button.tsx';
import { LevelIcon, levelWords } from '../ui/level-mark.tsx';
import { Menu, MenuItem } from '../ui/menu.tsx';
import { answerWords } from './answers.ts';
import { anchorOf } from './finding-anchor.ts';
import { Listening } from './finding-listening.tsx';
import { Place } from './finding-place.tsx';
import { repairWords, takenWords } from './repair-words.ts';
import { SharedFiles } from './shared-files.tsx';
import type { ViewedSession } from './viewed-session.ts';

/** What can be done about findings; nothing on a stored report. */
export type FindingActions = {
  chosen?: readonly ChosenRepair[] | undefined;
  onChoose?: ((repairs: readonly ChosenRepair[]) => void) | undefined;
  onUndo?: ((repairs: readonly ChosenRepair[]) => void) | undefined;
  onAnswer?: ((finding: Finding, answer: AnswerKind | null) => void) | undefined;
  /** Brings the finding's place into the picture. */
  onShow?: ((finding: Finding) => void) | undefined;
};

/** One finding: what, where, why, and what can be done about it. */
export function FindingItem({
  finding,
  view,
  ...actions
}: FindingActions & { view: ViewedSession; finding: Finding }): ReactNode {
  const { chosen = [], onChoose, onAnswer } = actions;
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
        <Listening finding={finding} view={view} onShow={actions.onShow} />
        {finding.perFile && <SharedFiles finding={finding} view={view} {...actions} />}
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
            <RepairButtons finding={finding} {...actions} />
            {onAnswer && !taken && finding.answer === null && finding.level !== 'note' && (
              <AnswerMenu onAnswer={(answer) => onAnswer(finding, answer)} />
            )}
          </div>
        )}
      </div>
    </li>
  );
}

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

/** Whether a taken repair is the answer to this finding. */
export function answersFinding(repair: ChosenRepair, finding: Finding): boolean {
  return (
    repair.code === finding.code &&
    repair.files.length === finding.files.length &&
    repair.files.every((path, index) => path === finding.files[index])
  );
}

/** The repairs on offer, or the one that was taken, with a way back. */
export function RepairButtons({
  finding,
  chosen = [],
  onChoose,
  onUndo,
}: Pick<FindingActions, 'chosen' | 'onChoose' | 'onUndo'> & { finding: Finding }): ReactNode {
  const taken = chosen.find((repair) => answersFinding(repair, finding));
  if (taken) {
    return (
      <>
        <span className="text-small font-medium text-case">{takenWords[taken.repair]}</span>
        <Button size="small" onClick={() => onUndo?.([taken])}>
          Undo
        </Button>
      </>
    );
  }
  return finding.repairs.map((repair: RepairKind, index) => (
    <Button
      key={repair}
      size="small"
      kind={index === 0 ? 'primary' : 'plain'}
      onClick={() => onChoose?.([chooseRepair(finding, repair)])}
    >
      {repairWords[repair]}
    </Button>
  ));
}
