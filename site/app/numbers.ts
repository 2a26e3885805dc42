/** Numbers as people type and read them: a comma or a point, and nothing else. */

const WRITTEN = /^[+\-−]?(\d+([.,]\d*)?|[.,]\d+)$/;

/** The number in the text, or null where it is not one number ("2,5" and "2.5" are; "2,500.1", "1e3" and "2 mm" are not). */
export function numberFrom(text: string): number | null {
  const written = text.trim();
  if (!WRITTEN.test(written)) return null;
  const value = Number(written.replace("−", "-").replace(",", "."));
  return Number.isFinite(value) ? value : null;
}

/** The number as a field shows it: no more digits than it has, with a true minus. */
export function shownNumber(value: number): string {
  return String(Number(value.toFixed(6))).replace("-", "−");
}

/** Millimetres as a drawing shows them: one decimal at least. */
export function shownMm(value: number): string {
  const digits = Math.abs(value * 10 - Math.round(value * 10)) < 1e-6 ? 1 : 2;
  return value.toFixed(digits).replace("-", "−");
}

/** The next value on a field's scale of steps, so that 2.13 steps to 2.2 and not to 2.23. */
export function stepped(value: number, step: number, direction: 1 | -1): number {
  const steps = value / step;
  const next = direction > 0 ? Math.floor(steps + 1e-9) + 1 : Math.ceil(steps - 1e-9) - 1;
  return Number((next * step).toFixed(6));
}
