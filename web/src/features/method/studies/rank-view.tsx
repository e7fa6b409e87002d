import { use } from 'react';
import { formatLevel } from '#shared/domain/format.ts';
import { rankStudySchema, type RankStudy } from '#shared/studies/rank-study.ts';
import { ChartFrame } from '#web/charts/chart-frame.tsx';
import { ProportionChart } from '#web/charts/proportion-chart.tsx';
import { rankRows, rankTable } from './rank-data.ts';
import { StudyNotes } from './study-notes.tsx';

/** The committed study, if there is one yet. */
const files = import.meta.glob<unknown>('../../../../../shared/studies/ranks.json', { import: 'default' });
const reading: Promise<RankStudy | null> = (async () => {
  const [load] = Object.values(files);
  return load ? rankStudySchema.parse(await load()) : null;
})();

/** The rank study: how often all rank ranges of a board hold at once, scenario by scenario. */
export default function RankView() {
  const study = use(reading);
  if (!study) return <p className="small quiet">The study has not been published yet.</p>;
  const title = 'All rank ranges of a board at once';
  const boards = study.scenarios.reduce((n, s) => n + s.boards, 0);
  return (
    <div className="flow study">
      <ChartFrame title={title} quiet={`(joint level ${formatLevel(study.level)})`} fileName="evenbeam-rank-study" table={rankTable(study, title)}
        says={`Each row is a scenario. The dot is the share of boards on which the ranges of all entries held their true ranks, with its 99\u202f% Wilson interval; the upright line is ${formatLevel(study.level)}. More is cautious, not better. A cross would mark a share below the line by more than three standard errors.`}>
        <ProportionChart label={title} rows={rankRows(study)} nominal={[study.level]} />
      </ChartFrame>
      <StudyNotes study={study} trials={boards} unit="boards" />
    </div>
  );
}
