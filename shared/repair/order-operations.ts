import type { Operation } from './repair-plan.ts';

const operationOrder: readonly Operation['kind'][] = [
  'take-channel',
  'join',
  'high-pass',
  'gain',
  'fade',
  'move',
  'pad',
];

/**
 * One operation of a kind (fades: any number that do not overlap), in the order of rendering.
 * `frames` is the length of what they are done to.
 */
export function inOrder(operations: readonly Operation[], frames: number): Operation[] {
  const kept: Operation[] = [];
  for (const operation of onTakenChannel(operations)) {
    const clash = kept.findIndex((other) => excludes(other, operation));
    if (clash < 0) kept.push(operation);
    else if (operation.kind === 'gain') kept[clash] = quieter(kept[clash]!, operation);
  }
  return kept
    .map((operation) => padded(operation, kept, frames))
    .sort((a, b) => operationOrder.indexOf(a.kind) - operationOrder.indexOf(b.kind));
}

function excludes(a: Operation, b: Operation): boolean {
  if (a.kind !== 'fade' || b.kind !== 'fade') return a.kind === b.kind;
  const sameChannel = a.channel === null || b.channel === null || a.channel === b.channel;
  return sameChannel && a.startFrame < b.endFrame && b.startFrame < a.endFrame;
}

function quieter(a: Operation, b: Operation): Operation {
  return a.kind === 'gain' && b.kind === 'gain' && b.gainDb > a.gainDb ? a : b;
}

/** A moved file has its silence in front already counted in the length it is padded to. */
function padded(operation: Operation, all: readonly Operation[], frames: number): Operation {
  if (operation.kind !== 'pad') return operation;
  const moved = all.find((other) => other.kind === 'move')?.byFrames ?? 0;
  return { kind: 'pad', toFrames: Math.max(operation.toFrames, frames + moved) };
}

/** Where one channel becomes the whole output, fades of the others have nothing to do any more. */
function onTakenChannel(operations: readonly Operation[]): Operation[] {
  const taken = operations.find(({ kind }) => kind === 'take-channel');
  if (taken?.kind !== 'take-channel') return [...operations];
  return operations.flatMap((operation): Operation[] => {
    if (operation.kind !== 'fade' || operation.channel === null) return [operation];
    return operation.channel === taken.channel ? [{ ...operation, channel: null }] : [];
  });
}
