/** Why a dialog could not do what was asked; it stays open. */
export function Refusal({ problem }: { problem: string | null }) {
  return (
    <p role="alert" className="border-l-4 border-amber pl-2.5 font-semibold text-amber empty:hidden">
      {problem}
    </p>
  );
}
