import coverage from '#shared/studies/coverage.json' with { type: 'json' };
import { domainsOf, type FigureDomain } from '#shared/domain/figure-domain.ts';
import { gateClasses } from '#shared/domain/gate-classes.ts';
import type { CoverageStudy } from '#shared/studies/coverage-study.ts';

/** The domain of every figure of every shipped class, from the published coverage study. A test holds the file to its schema. */
export const figureDomains: readonly FigureDomain[] = gateClasses.flatMap(({ id }) => domainsOf(coverage as unknown as CoverageStudy, id));
