import { PageHead } from '#web/components/page-head.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { Contents } from '#web/features/method/components/contents.tsx';
import { Figures } from '#web/features/method/sections/figures.tsx';
import { Intervals, RandomNumbers } from '#web/features/method/sections/intervals.tsx';
import { Determined, Inverse, PassesPart } from '#web/features/method/sections/inverse.tsx';
import { Design, Parameters, Purpose, Representation } from '#web/features/method/sections/model.tsx';
import { Ranks } from '#web/features/method/sections/ranks.tsx';
import { Conformance, Literature, Versions } from '#web/features/method/sections/record.tsx';
import { Coverage, Domain, RankStudy } from '#web/features/method/sections/studies.tsx';
import { Chained, Limits, RunSheets, SecondOpinions } from '#web/features/method/sections/taking.tsx';

/** The method in words and formulas, in the order of features/method/outline.ts. */
export function Component() {
  return (
    <div className="p-method">
      <Wrap>
        <PageHead above="Method M1" title="One fixed linear inverse" opening="Every dataset of every provider is estimated by exactly this procedure, so that two figures differ only where the counts differ." />
        <Contents />
        <Purpose />
        <Representation />
        <Parameters />
        <Design />
        <Inverse />
        <PassesPart />
        <Determined />
        <Figures />
        <Intervals />
        <RandomNumbers />
        <RunSheets />
        <Chained />
        <Ranks />
        <Domain />
        <Coverage />
        <RankStudy />
        <Limits />
        <SecondOpinions />
        <Versions />
        <Conformance />
        <Literature />
      </Wrap>
    </div>
  );
}
