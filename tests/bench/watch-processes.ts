import { readFile, readdir, writeFile } from 'node:fs/promises';

/** /proc/PID/stat counts time in hundredths of a second on every Linux (USER_HZ, proc(5)). */
const ticksPerSecond = 100;

type Process = { pid: number; parent: number; cpuSeconds: number; isRenderer: boolean };

/**
 * User and system time so far of a process, of all it started, and of those of them that ended.
 */
export async function cpuSecondsOf(root: number): Promise<number> {
  return (await family(root)).reduce((sum, { cpuSeconds }) => sum + cpuSeconds, 0);
}

/** Most memory any renderer of this browser ever held since `forgetPeaks`, in bytes (VmHWM). */
export async function rendererPeakBytes(root: number): Promise<number> {
  const peaks = await Promise.all(
    (await family(root))
      .filter(({ isRenderer }) => isRenderer)
      .map(async ({ pid }) => {
        const status = await readFile(`/proc/${pid}/status`, 'utf8').catch(() => '');
        return Number(/^VmHWM:\s+(\d+) kB$/m.exec(status)?.[1] ?? 0) * 1024;
      }),
  );
  return Math.max(0, ...peaks);
}

/** Lets the kernel count peaks anew from what is held now (proc(5), clear_refs). */
export async function forgetPeaks(root: number): Promise<void> {
  for (const { pid } of await family(root)) {
    await writeFile(`/proc/${pid}/clear_refs`, '5').catch(() => undefined);
  }
}

/** A process and everything below it. */
async function family(root: number): Promise<Process[]> {
  const pids = (await readdir('/proc')).map(Number).filter((pid) => pid > 0);
  const all = (await Promise.all(pids.map(readProcess))).filter((found) => found !== null);
  const members: Process[] = [];
  const wanted = [root];
  for (let pid = wanted.pop(); pid !== undefined; pid = wanted.pop()) {
    members.push(...all.filter((candidate) => candidate.pid === pid));
    wanted.push(...all.filter(({ parent }) => parent === pid).map((child) => child.pid));
  }
  return members;
}

async function readProcess(pid: number): Promise<Process | null> {
  try {
    const stat = await readFile(`/proc/${pid}/stat`, 'utf8');
    // The name stands in brackets and may hold anything: fields are counted behind the last one.
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    // Fields 14 to 17: utime, stime and those of children waited for. The first one here is 3.
    const ticks = fields.slice(11, 15).reduce((sum, field) => sum + Number(field), 0);
    const command = await readFile(`/proc/${pid}/cmdline`, 'utf8');
    return {
      pid,
      parent: Number(fields[1]),
      cpuSeconds: ticks / ticksPerSecond,
      isRenderer: command.includes('--type=renderer'),
    };
  } catch {
    return null;
  }
}
