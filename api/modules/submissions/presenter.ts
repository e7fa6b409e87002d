import type { EntityManager } from '@mikro-orm/postgresql';
import type { Message, Submission as View, SubmissionItem } from '#shared/contracts/submissions.ts';
import { checksWhileEstimating } from '#shared/domain/checks.ts';
import { judge, type Action, type Asker } from '#shared/domain/rules.ts';
import { Decision } from '#api/entities/decision.ts';
import { SubmissionEstimate } from '#api/entities/submission-estimate.ts';
import { SubmissionFile } from '#api/entities/submission-file.ts';
import { SubmissionMessage } from '#api/entities/submission-message.ts';
import { SubmissionMove } from '#api/entities/submission-move.ts';
import type { Submission } from '#api/entities/submission.ts';
import { presentDevice } from '#api/modules/devices/presenter.ts';
import { presentClassRef } from '#api/modules/gate-classes/presenter.ts';
import { isRecordComplete } from './service.ts';

export const presentMessage = (m: SubmissionMessage): Message => ({ id: m.id, author: m.authorName, role: m.role, organisation: m.organisationName ?? null, at: m.at.toISOString(), body: m.body });

/** What a line of a list reads. */
export type ItemSource = Pick<Submission, 'id' | 'title' | 'state' | 'progress' | 'device' | 'gateClass' | 'runSheet' | 'createdAt' | 'changedAt'>;

export const presentItem = (s: ItemSource): SubmissionItem => ({
  id: s.id,
  title: s.title,
  state: s.state,
  progress: s.progress,
  device: s.device ? presentDevice(s.device.unwrap()) : null,
  gateClass: presentClassRef(s.gateClass),
  runSheet: s.runSheet?.id ?? null,
  createdAt: s.createdAt.toISOString(),
  changedAt: s.changedAt.toISOString(),
});

const stageWords: Readonly<Record<string, string>> = {
  design: 'Building the design matrix', inverse: 'Inverting the design', passes: 'Estimating', replicates: 'Bootstrap replicates', figures: 'Reading the figures', diagnostics: 'Sealed circuits and drift',
};

const mayOf = (asker: Asker, s: Submission): View['may'] => {
  const open = (action: Action): boolean => judge(action, asker, { owner: s.organisation.id, state: s.state }).allowed;
  return {
    edit: open('submission.edit'), replace: open('submission.replace'), send: open('submission.send') && isRecordComplete(s), cancel: open('submission.cancel'), message: open('submission.write-message'),
  };
};

const presentResult = (e: SubmissionEstimate): View['result'] => ({
  method: e.method, replicates: e.summary.replicates, figures: e.summary.figures, sealedCheck: e.summary.sealedCheck, warnings: e.summary.warnings,
  patches: e.summary.patches.map(({ qubits, columns, rank, conditionRatio, complete, sound, settled, misfit }) => ({ qubits, columns, rank, conditionRatio, complete, sound, settled, misfit })),
});

/** A submission whole, as one caller may see it. The submission comes from `findSubmission`. */
export const presentSubmission = async (em: EntityManager, s: Submission, asker: Asker): Promise<View> => {
  const file = await em.findOneOrFail(SubmissionFile, { id: s.fileId });
  const moves = await em.find(SubmissionMove, { submissionId: s.id }, { orderBy: { id: 'asc' } });
  const messages = await em.find(SubmissionMessage, { submissionId: s.id }, { orderBy: { at: 'asc', id: 'asc' } });
  const decision = await em.findOne(Decision, { submissionId: s.id }, { orderBy: { round: 'desc' } });
  const estimate = s.estimateId ? await em.findOne(SubmissionEstimate, { id: s.estimateId }, { exclude: ['sealedPoints'] }) : null;
  const organisation = s.organisation.unwrap();
  const checking = s.state === 'checking' || s.state === 'draft';
  const isPublic = ['frozen', 'superseded', 'withdrawn'].includes(s.state);
  return {
    ...presentItem(s),
    organisation: { id: organisation.id, name: organisation.name },
    round: s.round,
    file: { name: file.name, bytes: file.size, circuits: file.summary.circuits, contentId: file.contentId, bytesSha256: file.bytesSha256, href: `/api/v1/submissions/${s.id}/dataset` },
    register: s.register,
    gates: file.summary.gates,
    stage: checking && s.stage ? (stageWords[s.stage] ?? s.stage) : null,
    replicatesDone: s.replicatesDone ?? null,
    replicates: s.replicates,
    checks: checking ? checksWhileEstimating(s.checks, s.stage ?? null, s.replicatesDone ?? null, s.replicates) : s.checks,
    record: { access: s.access ?? null, interests: s.interests ?? null, embargoUntil: s.embargoUntil ?? null, notes: s.notes ?? null },
    recordComplete: isRecordComplete(s),
    result: estimate ? presentResult(estimate as SubmissionEstimate) : null,
    history: moves.map((m) => ({ state: m.state, at: m.at.toISOString(), by: m.byName ?? null, reason: m.reason ?? null })),
    messages: messages.map(presentMessage),
    decision: decision ? { outcome: decision.outcome, reason: decision.reason, at: decision.at.toISOString() } : null,
    entry: s.accession && s.version && (isPublic || s.state === 'embargoed') ? { accession: s.accession, version: s.version } : null,
    may: mayOf(asker, s),
  };
};
