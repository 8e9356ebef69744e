import { expect, it } from 'vitest';
import { AppError, notFound } from './errors';

it('carries what the person reads and at which field', () => {
  const error = new AppError('invalid', 'The amount was not understood.', { amount: ['Write it like 42 or 42.50.'] });
  expect(error).toBeInstanceOf(Error);
  expect(error).toMatchObject({ name: 'AppError', code: 'invalid', message: 'The amount was not understood.', fields: { amount: ['Write it like 42 or 42.50.'] } });
});

it('a missing record says what is missing and nothing about whose it is', () => {
  expect(notFound('pay run')).toMatchObject({ code: 'not_found', message: 'This pay run was not found.', fields: {} });
});
