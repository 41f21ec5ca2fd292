import type { Engine, EngineLocale } from './engine';

/** A value as it would be typed into the engine; text that would be read as something else gets an apostrophe before it. */
export function literal(value: string | number | boolean | null, { helpers }: Pick<Engine, 'helpers'>, locale: EngineLocale): string {
  if (value === null) return '';
  if (typeof value === 'boolean') return value ? 'TRUE' : 'FALSE';
  if (typeof value === 'number') return String(value);
  const text = value.trim();
  const isMisread =
    /^['=+\-@#]/u.test(value) ||
    /^(?:true|false)$/iu.test(text) ||
    helpers.isNumber(text, locale) ||
    helpers.isDateTime(text, locale);
  return isMisread ? `'${value}` : value;
}
