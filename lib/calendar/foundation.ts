/** What every school of keyboard harmony begins with: kinds of lessons and what can stand in a room. Labels can be changed. */
export const FIRST_LESSON_TYPES = [
  { code: 'single', label: 'Lesson', seatsMin: 1, seatsMax: 1, isTaught: true },
  { code: 'group', label: 'Class', seatsMin: 2, seatsMax: 12, isTaught: true },
  { code: 'trial', label: 'Trial lesson', seatsMin: 1, seatsMax: 1, isTaught: true },
  { code: 'make_up', label: 'Make-up lesson', seatsMin: 1, seatsMax: 1, isTaught: true },
  { code: 'workshop', label: 'Workshop', seatsMin: 1, seatsMax: 40, isTaught: true },
  { code: 'rehearsal', label: 'Rehearsal', seatsMin: 0, seatsMax: 40, isTaught: false },
  { code: 'recital', label: 'Recital', seatsMin: 0, seatsMax: 120, isTaught: false },
  { code: 'rental', label: 'Rental', seatsMin: 0, seatsMax: 1, isTaught: false },
  { code: 'tuning', label: 'Tuning', seatsMin: 0, seatsMax: 1, isTaught: false },
  { code: 'meeting', label: 'Meeting', seatsMin: 0, seatsMax: 1, isTaught: false },
] as const;

export const FIRST_FEATURES = [
  { code: 'acoustic_piano', label: 'acoustic piano' },
  { code: 'digital_piano', label: 'digital piano' },
  { code: 'grand_piano', label: 'grand piano' },
  { code: 'drum_kit', label: 'drum kit' },
  { code: 'pa', label: 'PA' },
  { code: 'step_free', label: 'step-free access' },
] as const;

export const FIRST_SUBJECT = { code: 'keyboard_harmony', label: 'Keyboard harmony' } as const;
