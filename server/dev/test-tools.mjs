import { exists, findOnPath } from './debian.mjs';
import { runProgram } from './processes.mjs';

/** Debian's Chromium, which the browser tests drive. */
export const chromiumPath = '/usr/bin/chromium';

/** Recordings that Debian ships: the material of tests on real sound. */
export const recordingsFolder = '/usr/share/sonic-pi/samples';

/** @param {string} program @param {string} [debianPackage] @returns {import('./debian.mjs').DebianNeed} */
function command(program, debianPackage = program) {
  return {
    name: program,
    package: debianPackage,
    present: async () => (await findOnPath(program)) !== null,
  };
}

/** The programs and recordings that tests compare against or drive. */
export const testTools = [
  { name: 'chromium', package: 'chromium', present: () => exists(chromiumPath) },
  command('sox'),
  {
    name: "sox's file formats",
    package: 'libsox-fmt-all',
    present: async () =>
      (await runProgram(['dpkg-query', '-W', '-f', '${Status}', 'libsox-fmt-all'])).stdout ===
      'install ok installed',
  },
  command('ffmpeg'),
  command('unzip'),
  command('zip'),
  command('python3'),
  command('pdftotext', 'poppler-utils'),
  {
    name: 'recordings',
    package: 'sonic-pi-samples',
    present: () => exists(recordingsFolder),
  },
];
