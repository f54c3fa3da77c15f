import { useState } from 'react';
import type { ControlProps } from '../../components/ui/field';
import { TextInput } from '../../components/ui/text-input';

type Props = ControlProps & { name: string; valueCents: number; onChange: (cents: number) => void };

/** Money is typed in whole units and kept in cents. */
export function MoneyInput({ valueCents, onChange, ...rest }: Props) {
  const [typed, setTyped] = useState<string | null>(null);
  return (
    <TextInput
      {...rest}
      inputMode="decimal"
      value={typed ?? (Number.isNaN(valueCents) ? '' : (valueCents / 100).toFixed(2))}
      onChange={(event) => {
        setTyped(event.target.value);
        onChange(centsOf(event.target.value));
      }}
      onBlur={() => setTyped(null)}
    />
  );
}

/** "95", "95.5" and "95,50"; NaN where it is no amount. */
export function centsOf(text: string): number {
  const plain = text.trim().replace(',', '.');
  return /^\d+(\.\d{0,2})?$/.test(plain) ? Math.round(Number(plain) * 100) : Number.NaN;
}
