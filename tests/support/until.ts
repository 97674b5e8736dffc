/** Waits for a condition, looking again whenever the event loop comes round; fails with what it waited for. */
export async function until<T>(what: string, look: () => T | null | undefined | false, limitMs = 10_000): Promise<T> {
  const end = performance.now() + limitMs;
  for (;;) {
    const found = look();
    if (found !== null && found !== undefined && found !== false) return found;
    if (performance.now() > end) throw new Error(`waited in vain for ${what}`);
    await new Promise((resolve) => setTimeout(resolve, 2));
  }
}
