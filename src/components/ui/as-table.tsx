import { Button } from './button';

type Props = { isTable: boolean; onToggle: () => void };

/** Switches between a picture and the same figures as a table. */
export function AsTable({ isTable, onToggle }: Props) {
  return (
    <Button look="text" className="text-sm" aria-pressed={isTable} onClick={onToggle}>
      {isTable ? 'as a picture' : 'as a table'}
    </Button>
  );
}
