import { describe, expect, it } from 'vitest';
import { checkLandingPages } from '#tests/support/landing-checker.ts';
import type { RunningRegistry } from '../support/registry.ts';

/** Every entry of the demo registry as a machine sees it. */
export const landingPages = (registry: () => RunningRegistry): void => {
  describe('the landing pages of the demo registry', () => {
    it('have no broken link and no missing property, for every public version of every entry', async () => {
      const { url } = registry();
      const { versions, links, faults } = await checkLandingPages(url, url);
      expect(faults).toEqual([]);
      expect(versions).toBeGreaterThan(2);
      expect(links).toBeGreaterThan(versions * 12);
    }, 900_000);
  });
};
