import { describe, expect, it } from 'vitest';
import { readArguments } from '../../../main/desktop/opening';

describe('readArguments', () => {
  it('takes project files, wherever they stand, as absolute paths', () => {
    const asked = readArguments(['/opt/soakwright', 'plans/a.soak', '--no-sandbox', '/tmp/B.SOAK'], '/home/me');
    expect(asked.files).toEqual(['/home/me/plans/a.soak', '/tmp/B.SOAK']);
  });

  it('takes no switch of the runtime and no folder for a file', () => {
    expect(readArguments(['.', '--user-data-dir=/tmp/x.soak', '--sample=a'], '/').files).toEqual([]);
  });

  it('takes a sample by its id, and nothing that could be a path', () => {
    expect(readArguments(['--sample=forged-block'], '/').sample).toBe('forged-block');
    expect(readArguments(['--sample=../../etc/passwd'], '/').sample).toBeNull();
    expect(readArguments([], '/').sample).toBeNull();
  });
});
