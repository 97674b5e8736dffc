import type { ReactNode } from 'react';

type GallerySectionProps = { title: string; note?: string; children: ReactNode };

export function GallerySection({ title, note, children }: GallerySectionProps) {
  return (
    <section aria-label={title} className="flex flex-col gap-6 border-t border-rule py-10">
      <div className="flex flex-col gap-1">
        <h2 className="text-2xl">{title}</h2>
        {note ? <p className="max-w-3xl text-soft">{note}</p> : null}
      </div>
      {children}
    </section>
  );
}
