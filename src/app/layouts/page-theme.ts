import { useLayoutEffect } from 'react';

/** Grounds of the two themes, for the browser's own bars; the page token of tokens.css. */
const grounds = { day: '#edf1ef', dim: '#101615' };

/**
 * Puts the whole window, browser bars included, into a theme for as long as the layout is mounted, and leaves
 * it as it was found.
 */
export function usePageTheme(theme: keyof typeof grounds) {
  useLayoutEffect(() => {
    const root = document.documentElement;
    const before = root.dataset.theme;
    root.dataset.theme = theme;
    const restoreMeta = [
      setMeta('theme-color', grounds[theme]),
      setMeta('color-scheme', theme === 'dim' ? 'dark' : 'light'),
    ];
    return () => {
      if (before === undefined) delete root.dataset.theme;
      else root.dataset.theme = before;
      for (const restore of restoreMeta) restore();
    };
  }, [theme]);
}

function setMeta(name: string, content: string): () => void {
  const found = document.head.querySelector<HTMLMetaElement>(`meta[name="${name}"]`);
  const meta = found ?? document.head.appendChild(document.createElement('meta'));
  const before = meta.content;
  meta.name = name;
  meta.content = content;
  return () => {
    if (found) found.content = before;
    else meta.remove();
  };
}
