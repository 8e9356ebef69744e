import { AppError } from '../errors';

/** The life of a pay run (job map 2.6). Nothing leads back from closed: a later change goes into the next run. */
export const PAY_RUN_STATES = ['open', 'gathering', 'with_teachers', 'answering_queries', 'ready_to_approve', 'approved', 'closed', 'exported'] as const;
export type PayRunState = (typeof PAY_RUN_STATES)[number];

export const PAY_RUN_WORDS: Record<PayRunState, string> = {
  open: 'not built yet', gathering: 'being prepared', with_teachers: 'with the teachers', answering_queries: 'questions to answer',
  ready_to_approve: 'ready to approve', approved: 'approved', closed: 'closed', exported: 'closed, workbook taken',
};

const MOVES: Record<PayRunState, readonly PayRunState[]> = {
  open: ['gathering'],
  gathering: ['gathering', 'with_teachers'],
  with_teachers: ['gathering', 'with_teachers', 'answering_queries', 'ready_to_approve'],
  answering_queries: ['gathering', 'answering_queries', 'with_teachers', 'ready_to_approve'],
  ready_to_approve: ['gathering', 'answering_queries', 'approved'],
  approved: ['closed'],
  closed: ['exported'],
  exported: ['exported'],
};

export const mayMove = (from: PayRunState, to: PayRunState): boolean => MOVES[from].includes(to);

/** Refuses a move in the words of the screen it is asked from. */
export function assertMove(from: PayRunState, to: PayRunState): void {
  if (mayMove(from, to)) return;
  if (from === 'closed' || from === 'exported') throw new AppError('conflict', 'This pay run is closed. A change goes into the next run as a correction.');
  throw new AppError('conflict', `This pay run is ${PAY_RUN_WORDS[from]}; that step is not possible now.`);
}

export type CheckState = 'waiting' | 'agreed' | 'queried' | 'passed_over';
export const CHECK_WORDS: Record<CheckState, string> = { waiting: 'not answered', agreed: 'agreed', queried: 'asked', passed_over: 'passed over by the owner' };

/** Where the run stands once the teachers' answers are counted. */
export function stateAfterAnswers(checks: readonly CheckState[], openQueries: number): 'with_teachers' | 'answering_queries' | 'ready_to_approve' {
  if (openQueries > 0) return 'answering_queries';
  return checks.every((check) => check === 'agreed' || check === 'passed_over') ? 'ready_to_approve' : 'with_teachers';
}
