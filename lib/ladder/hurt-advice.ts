/** General information, not medical advice (after NASM and PAMA, "Protecting Your Neuromusculoskeletal Health"). */
export const HURT_ADVICE = ['Stop playing now and rest your hands.', 'Pain is never part of practising, and nobody expects you to play through it.', 'If it does not go away or comes back, see a doctor.'] as const;
