import { BookOpen, CalendarDays, CreditCard, DoorOpen, GraduationCap, HandCoins, Home, Import, ListChecks, Mail, Music4, Piano, Settings, SquareCheckBig, Sun, Timer, Users, WalletCards, Waypoints, type LucideIcon } from 'lucide-react';
import type { Role } from '@/policies/ability';

export type Section = { href: string; label: string; icon: LucideIcon };

const TODAY: Section = { href: '/today', label: 'Today', icon: Sun };
const CALENDAR: Section = { href: '/calendar', label: 'Calendar', icon: CalendarDays };
const ENQUIRIES: Section = { href: '/enquiries', label: 'Enquiries', icon: Mail };
const STUDENTS: Section = { href: '/students', label: 'Students', icon: GraduationCap };
const FAMILIES: Section = { href: '/families', label: 'Families', icon: Users };
const LADDER: Section = { href: '/ladder', label: 'Ladder', icon: ListChecks };
const TUITION: Section = { href: '/tuition', label: 'Tuition', icon: CreditCard };
const PAYROLL: Section = { href: '/payroll', label: 'Payroll', icon: HandCoins };
const ROOMS: Section = { href: '/rooms', label: 'Rooms', icon: DoorOpen };
const REGISTER: Section = { href: '/register', label: 'Register', icon: SquareCheckBig };
const IMPORT: Section = { href: '/import', label: 'Import', icon: Import };
const VOICINGS: Section = { href: '/voicings', label: 'Voicings', icon: Waypoints };
const SETTINGS: Section = { href: '/settings', label: 'Settings', icon: Settings };

/** What each hat finds in the stave of sections, most used first. The first four stand in the bar of a phone. */
export const SECTIONS: Record<Role, readonly Section[]> = {
  owner: [TODAY, CALENDAR, ENQUIRIES, STUDENTS, FAMILIES, LADDER, REGISTER, TUITION, PAYROLL, ROOMS, IMPORT, SETTINGS],
  desk: [TODAY, CALENDAR, ENQUIRIES, STUDENTS, FAMILIES, REGISTER, LADDER, TUITION, ROOMS],
  teacher: [TODAY, CALENDAR, { ...STUDENTS, label: 'My students' }, LADDER, VOICINGS, { href: '/my-hours', label: 'My hours', icon: Timer }],
  guardian: [
    { href: '/home', label: 'Home', icon: Home }, { href: '/lessons', label: 'Lessons', icon: CalendarDays }, { href: '/progress', label: 'Progress', icon: BookOpen },
    { href: '/bills', label: 'Bills', icon: WalletCards },
  ],
  student: [
    { href: '/home', label: 'Home', icon: Home }, { href: '/practice', label: 'Practice', icon: Piano }, { href: '/progress', label: 'My ladder', icon: Music4 }, { href: '/lessons', label: 'Lessons', icon: CalendarDays },
    VOICINGS, { href: '/bills', label: 'Bills', icon: WalletCards },
  ],
};

export const isFamilyRole = (role: Role): boolean => role === 'guardian' || role === 'student';
export const homeOf = (role: Role): string => (isFamilyRole(role) ? '/home' : '/today');

export const ROLE_WORDS: Record<Role, string> = { owner: 'Owner', desk: 'Front desk', teacher: 'Teacher', student: 'Student', guardian: 'Guardian' };

/** The section a page belongs to: the longest address that begins it. */
export function activeSection(sections: readonly Section[], pathname: string): Section | undefined {
  return [...sections].filter(({ href }) => pathname === href || pathname.startsWith(`${href}/`)).sort((a, b) => b.href.length - a.href.length)[0];
}
