import { GallerySection } from './gallery-section.tsx';

const grounds = [
  ['page', 'bg-page'],
  ['sheet', 'bg-sheet'],
  ['rule', 'bg-rule'],
  ['edge', 'bg-edge'],
  ['ink', 'bg-ink'],
  ['soft', 'bg-soft'],
  ['copper', 'bg-copper'],
  ['copper-soft', 'bg-copper-soft'],
  ['copper-tint', 'bg-copper-tint'],
  ['jacket', 'bg-jacket'],
  ['jacket-tint', 'bg-jacket-tint'],
  ['amber', 'bg-amber'],
  ['stop', 'bg-stop'],
] as const;

const sizes = [
  ['text-base', 'text-base'],
  ['text-lg, a lede', 'text-lg'],
  ['text-xl, what comes next', 'text-xl'],
  ['text-answer, the phone', 'text-answer'],
  ['text-2xl, a heading', 'text-2xl font-bold'],
  ['text-3xl, a title', 'text-3xl font-bold'],
  ['text-step, the step that is on', 'text-step font-bold'],
  ['text-figure', 'text-figure font-mono font-semibold'],
] as const;

export function ScaleSection() {
  return (
    <GallerySection title="Colours and sizes">
      <ul className="grid grid-cols-[repeat(auto-fill,minmax(9rem,1fr))] gap-4">
        {grounds.map(([name, ground]) => (
          <li key={name} className="flex flex-col gap-1.5">
            <span className={`h-14 rounded border border-edge ${ground}`} />
            {name}
          </li>
        ))}
      </ul>
      <div className="flex flex-col gap-2">
        {sizes.map(([name, look]) => (
          <p key={name} className={look}>
            {name} 0O 1lI 8B
          </p>
        ))}
      </div>
    </GallerySection>
  );
}
