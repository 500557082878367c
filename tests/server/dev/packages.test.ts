import { describe, expect, test } from 'vitest';
import { packagesAgree } from '../../../server/dev/packages.mjs';

const react = { version: '19.3.1', integrity: 'sha512-a' };
const native = { version: '1.0.0', integrity: 'sha512-b', optional: true };
const wanted = {
  '': { version: '0.1.0' },
  'node_modules/react': react,
  'node_modules/native-windows': native,
};

describe('installed packages agree with the lock file', () => {
  test('when all are there, but for those of other systems', () => {
    expect(packagesAgree(wanted, { 'node_modules/react': react })).toBe(true);
    expect(
      packagesAgree(wanted, { 'node_modules/react': react, 'node_modules/native-windows': native }),
    ).toBe(true);
  });

  test.each([
    ['a missing one', {}],
    ['another version', { 'node_modules/react': { ...react, version: '19.3.0' } }],
    ['other content', { 'node_modules/react': { ...react, integrity: 'sha512-c' } }],
    ['one left over', { 'node_modules/react': react, 'node_modules/x/node_modules/react': react }],
  ])('not with %s', (_what, installed) => {
    expect(packagesAgree(wanted, installed)).toBe(false);
  });
});
