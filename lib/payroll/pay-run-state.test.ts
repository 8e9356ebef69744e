import { expect, it } from 'vitest';
import { assertMove, mayMove, PAY_RUN_STATES, stateAfterAnswers } from './pay-run-state';

it('never leads back from closed', () => {
  for (const to of PAY_RUN_STATES) expect(mayMove('closed', to)).toBe(to === 'exported');
  expect(() => assertMove('closed', 'gathering')).toThrow('A change goes into the next run as a correction.');
  expect(() => assertMove('open', 'approved')).toThrow('not built yet');
});

it('is not ready while a question is open or a teacher has not answered', () => {
  expect(stateAfterAnswers(['agreed', 'queried'], 1)).toBe('answering_queries');
  expect(stateAfterAnswers(['agreed', 'waiting'], 0)).toBe('with_teachers');
  expect(stateAfterAnswers(['agreed', 'passed_over'], 0)).toBe('ready_to_approve');
});
