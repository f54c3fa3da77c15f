import { useState } from 'react';
import { Button } from './button';
import { TextInput } from './text-input';

type Props = { label: string; value: string; onSearch: (word: string) => void };

/** A word to narrow a list by; the address keeps it, so it is sent when Enter is pressed. */
export function SearchBox({ label, value, onSearch }: Props) {
  const [word, setWord] = useState(value);
  return (
    <form
      role="search"
      aria-label={label}
      className="flex items-center gap-2"
      onSubmit={(event) => {
        event.preventDefault();
        onSearch(word.trim());
      }}
    >
      <TextInput
        type="search"
        aria-label={label}
        placeholder={label}
        className="max-w-[14rem]"
        value={word}
        onChange={(event) => setWord(event.target.value)}
      />
      <Button type="submit">Find</Button>
    </form>
  );
}
