import { RouteError } from '../components/ui/error-panel';

/** Where not even the shell could be shown. */
export function ShellError() {
  return (
    <main className="mx-auto max-w-[44rem] p-6">
      <RouteError />
    </main>
  );
}
