/** General information on hands and ears, never medical advice. */
export function HandsCare() {
  return (
    <p className="text-small text-ink-3">
      Warm up, rest often, and stop when something hurts: pain is no part of practising. Keep headphones soft. This is general information; with pain that stays, see a doctor.
    </p>
  );
}
