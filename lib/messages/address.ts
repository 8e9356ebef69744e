/**
 * One strictly written mail address, or null. Anything that a mail server could read as a second recipient or
 * a header (comma, line break, angle bracket, quotes) is refused.
 */
export function strictAddress(typed: string): string | null {
  const address = typed.trim();
  if (address.length > 254) return null;
  return /^[A-Za-z0-9.!#$%&'*+/=?^_`{|}~-]+@(?:[A-Za-z0-9](?:[A-Za-z0-9-]{0,61}[A-Za-z0-9])?\.)+[A-Za-z]{2,63}$/.test(address)
    ? address
    : null;
}

/** A display name on one line, without what a header gives meaning to. */
export const strictName = (name: string): string => name.replace(/[\p{Cc}\p{Cf}<>"]/gu, ' ').replace(/\s+/g, ' ').trim().slice(0, 120);
