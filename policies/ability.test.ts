import { describe, expect, it } from 'vitest';
import { abilityFor, assertCan, may, ROLES } from './ability';
import { SUBJECTS, type Actor } from './types';

const actor = (over: Partial<Actor>): Actor => ({ userId: 'user', personId: 'person', role: 'guardian', isLead: false, studentIds: [], payerIds: [], familyIds: [], taughtStudentIds: [], coveredTodayIds: [], ...over });
const answerOf = (attempt: () => void): unknown => {
  try {
    attempt();
    return 'allowed';
  } catch (error) {
    return error;
  }
};

describe('standing in front of a record', () => {
  const guardian = abilityFor(actor({ studentIds: ['ada'], payerIds: ['payer-noor'] }));

  it('one’s own is let through', () => {
    expect(answerOf(() => assertCan(guardian, 'read', 'Seat', { studentId: 'ada' }))).toBe('allowed');
    expect(answerOf(() => assertCan(guardian, 'update', 'Seat', { studentId: 'ada' }))).toBe('allowed');
  });
  it('a foreign record answers exactly like one that is missing', () => {
    const foreign = answerOf(() => assertCan(guardian, 'read', 'Seat', { studentId: 'ben' }));
    const missing = answerOf(() => assertCan(guardian, 'read', 'Seat', {}));
    expect(foreign).toMatchObject({ name: 'AppError', code: 'not_found', message: 'This seat was not found.', fields: {} });
    expect(missing).toEqual(foreign);
  });
  it('changing a foreign record does not tell that it is there either', () => {
    expect(answerOf(() => assertCan(guardian, 'update', 'InvoiceShare', { payerId: 'payer-sam' }))).toMatchObject({ code: 'not_found', message: 'This invoice share was not found.' });
  });
  it('what may be read but not changed says so in words', () => {
    expect(answerOf(() => assertCan(guardian, 'update', 'Progress', { studentId: 'ada' }))).toMatchObject({ code: 'forbidden', message: 'Your role does not let you do this with a progress.' });
  });
  it('who may read a list but not take it out is told whose business that is', () => {
    expect(answerOf(() => assertCan(abilityFor(actor({ role: 'desk' })), 'export', 'Invoice', {}))).toMatchObject({ code: 'forbidden', message: 'Only the owner takes lists out of the house.' });
    expect(answerOf(() => assertCan(guardian, 'export', 'Student', {}))).toMatchObject({ code: 'not_found' });
  });
  it('refuses with the right article', () => {
    expect(answerOf(() => assertCan(abilityFor(actor({ role: 'teacher', personId: 'mara' })), 'create', 'Occurrence', { plannedTeacherId: 'mara' }))).toMatchObject({ message: 'Your role does not let you do this with an occurrence.' });
  });
  it('a record without the field that decides is nobody’s', () => {
    for (const record of [{}, { studentId: null }, { studentId: undefined }, { studentId: '' }]) {
      expect(may(guardian, 'update', 'Consent', record), JSON.stringify(record)).toBe(false);
    }
  });
  it('a hat without records of its own sees no record', () => {
    const bare = abilityFor(actor({}));
    for (const name of ['Seat', 'Progress', 'Hearing', 'Student', 'InvoiceShare', 'Payment'] as const) {
      expect(may(bare, 'read', name, { id: 'x', studentId: 'x', payerId: 'x' }), name).toBe(false);
    }
  });
  it('the record that was handed in is left as it was', () => {
    const record = Object.freeze({ studentId: 'ada' });
    expect(may(guardian, 'read', 'Seat', record)).toBe(true);
    expect(Object.getOwnPropertySymbols(record)).toEqual([]);
    expect(Object.keys(record)).toEqual(['studentId']);
  });
});

describe('grants', () => {
  it('no role takes anything away, so that two hats add up', () => {
    for (const role of ROLES) for (const isLead of [false, true]) expect(abilityFor(actor({ role, isLead })).rules.filter(({ inverted }) => inverted)).toEqual([]);
  });
  it('nobody is granted a subject that does not exist, and none is granted to nobody', () => {
    const granted = new Set(ROLES.flatMap((role) => abilityFor(actor({ role, isLead: true })).rules.flatMap(({ subject }) => [subject].flat())));
    expect([...granted].sort()).toEqual([...SUBJECTS].sort());
  });
  it('to manage is to read, create, update and approve, but never to take lists out of the house', () => {
    const desk = abilityFor(actor({ role: 'desk' }));
    for (const name of ['Student', 'Family', 'Enquiry', 'Invoice', 'Payment'] as const) {
      for (const action of ['read', 'create', 'update', 'approve', 'manage'] as const) expect(may(desk, action, name), `${action} ${name}`).toBe(true);
      expect(may(desk, 'export', name), `export ${name}`).toBe(false);
    }
    const others = (['desk', 'teacher', 'student', 'guardian'] as const).map((role) => abilityFor(actor({ role, isLead: true, studentIds: ['ada'], payerIds: ['p'], taughtStudentIds: ['ada'] })));
    for (const name of SUBJECTS) expect(others.filter((ability) => ability.can('export', name)), name).toEqual([]);
  });
  it('only owner and desk hold whole tables of people and money', () => {
    for (const role of ['teacher', 'student', 'guardian'] as const) {
      const ability = abilityFor(actor({ role, studentIds: ['ada'], payerIds: ['p'], taughtStudentIds: ['ada'] }));
      for (const name of ['Family', 'Invoice', 'InvoiceShare', 'Payment', 'TuitionRun', 'PayRun', 'Rate', 'Account', 'Enquiry', 'Import', 'Incident', 'Scholarship', 'Settings', 'Price'] as const) {
        expect(may(ability, 'read', name), `${role} ${name}`).toBe(false);
      }
    }
  });
});
