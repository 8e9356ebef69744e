import { existsSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { ROLES } from '@/policies/ability';
import { activeSection, homeOf, isFamilyRole, SECTIONS } from './sections';

const groupOf = (role: (typeof ROLES)[number]) => (isFamilyRole(role) ? 'app/(family)' : 'app/(staff)');

describe('the list of sections', () => {
  it.each(ROLES)('leads a %s only to pages that are there', (role) => {
    for (const { href } of SECTIONS[role]) expect([groupOf(role), 'app/(all)'].some((group) => existsSync(`${group}${href}/page.tsx`)), `${role}: ${href}`).toBe(true);
    expect(SECTIONS[role].map(({ href }) => href)).toContain(homeOf(role));
  });
  it('has no section twice and no role without one', () => {
    for (const role of ROLES) expect(new Set(SECTIONS[role].map(({ href }) => href)).size).toBe(SECTIONS[role].length);
  });
  it('finds the section of a page by the longest address that begins it', () => {
    expect(activeSection(SECTIONS.owner, '/students/one')?.label).toBe('Students');
    expect(activeSection(SECTIONS.owner, '/studentsomething')).toBeUndefined();
    expect(activeSection(SECTIONS.teacher, '/my-hours')?.label).toBe('My hours');
  });
  it('keeps payroll and prices out of the desk’s list', () => {
    expect(SECTIONS.desk.map(({ href }) => href)).not.toEqual(expect.arrayContaining(['/payroll']));
    expect(readdirSync('app/(staff)')).toContain('payroll');
  });
});
