export type Decimal = '.' | ',';

const FORMS: Record<Decimal, { plain: RegExp; grouped: RegExp; group: RegExp }> = {
  '.': {
    plain: /^\d*\.?\d*$/,
    grouped: /^\d{1,3}(?:[,' \u00a0\u202f]\d{3})+(?:\.\d*)?$/,
    group: /[,' \u00a0\u202f]/g,
  },
  ',': {
    plain: /^\d*,?\d*$/,
    grouped: /^\d{1,3}(?:[.' \u00a0\u202f]\d{3})+(?:,\d*)?$/,
    group: /[.' \u00a0\u202f]/g,
  },
};

/**
 * The number that a cell states, as a plain decimal text; undefined where it is none. A thousands mark counts only where
 * every group behind it has three digits; a minus may stand behind, or the number in brackets, as ledgers print them.
 */
export function parseDecimal(cell: string, decimal: Decimal): string | undefined {
  let text = cell.replace('\u2212', '-');
  let sign = '';
  if (text.startsWith('(') && text.endsWith(')')) [sign, text] = ['-', text.slice(1, -1)];
  else if (text.startsWith('-')) [sign, text] = ['-', text.slice(1)];
  else if (text.startsWith('+')) text = text.slice(1);
  else if (text.endsWith('-')) [sign, text] = ['-', text.slice(0, -1)];
  text = text.replace(/^\s*[$€£]\s*|\s*[$€£]\s*$/g, '');
  if (text.startsWith('-') && sign === '') [sign, text] = ['-', text.slice(1)];
  const form = FORMS[decimal];
  if (form.grouped.test(text)) text = text.replace(form.group, '');
  else if (!form.plain.test(text)) return undefined;
  if (!/\d/.test(text)) return undefined;
  return sign + text.replace(',', '.');
}

/** Cents of a plain decimal text, half a cent away from zero; exact, since it never passes through a fraction. */
export function toCents(plain: string): number {
  const isNegative = plain.startsWith('-');
  const [whole = '', fraction = ''] = (isNegative ? plain.slice(1) : plain).split('.');
  const cents = Number(whole || '0') * 100 + Number(fraction.slice(0, 2).padEnd(2, '0'));
  const rounded = (fraction.charCodeAt(2) || 0) >= 53 ? cents + 1 : cents;
  return isNegative && rounded !== 0 ? -rounded : rounded;
}
