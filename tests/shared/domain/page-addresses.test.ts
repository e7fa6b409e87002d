import { describe, expect, it } from 'vitest';
import { isPageAddress } from '#shared/domain/page-addresses.ts';

describe('page addresses', () => {
  it('those of pages are known, with any part in place of a name', () => {
    for (const path of ['/', '/boards', '/boards/quarter-turn-1q/1', '/entries/EVB-000042', '/entries/EVB-000042/v/2', '/review', '/review/8d1f', '/desk/run-sheets/new', '/method/', '/Method']) expect(isPageAddress(path), path).toBe(true);
  });

  it('others are not: parts missing, parts too many, names of no page', () => {
    for (const path of ['/no', '/boards/quarter-turn-1q', '/entries', '/entries/EVB-000042/v', '/entries/EVB-000042/v/2/more', '/review/a/b', '/method/inverse', '/desk/nothing', '/wp-login.php']) expect(isPageAddress(path), path).toBe(false);
  });
});
