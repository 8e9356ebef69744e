/** "€" for a money field. */
export const signOf = ({ locale, currency }: { locale: string; currency: string }): string =>
  new Intl.NumberFormat(locale, { style: 'currency', currency }).formatToParts(0).find(({ type }) => type === 'currency')?.value ?? currency;
