import { type FormEvent, type ReactNode, useState } from 'react';
import { Button } from './button.tsx';
import { TextField } from './text-field.tsx';

type ListFilterProps = {
  /** What is searched: "Search cables". */
  label: string;
  /** The search that the list shows now; give the component a key of it, so that it follows the address. */
  words: string;
  onSearch: (words: string) => void;
  /** A field that narrows the list further. */
  children?: ReactNode;
};

/** Search words and one further choice above a list. */
export function ListFilter({ label, words, onSearch, children }: ListFilterProps) {
  const [typed, setTyped] = useState(words);

  function search(event: FormEvent) {
    event.preventDefault();
    onSearch(typed.trim());
  }

  return (
    <search className="pb-6 print:hidden">
      <form onSubmit={search} className="grid max-w-3xl items-end gap-4 sm:grid-cols-[minmax(0,1fr)_auto_13rem]">
        <TextField
          label={label}
          type="search"
          maxLength={80}
          autoComplete="off"
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
        />
        <Button type="submit">Search</Button>
        {children}
      </form>
    </search>
  );
}
