/** Reads a plain number, for quantities whose unit has no choice: "1.5e5". */
export function readPlain(text: string): { value: number; refusal: string | null } {
  const plain = text.trim().replaceAll('−', '-');
  const value = plain === '' ? Number.NaN : Number(plain);
  return { value, refusal: Number.isFinite(value) ? null : `“${text}” is not a number.` };
}
