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

/** The same for what has to be asked, such as a row of the database. */
export async function untilAsked<T>(
  what: string,
  ask: () => Promise<T | null | undefined | false>,
  limitMs = 10_000,
): Promise<T> {
  const end = performance.now() + limitMs;
  for (;;) {
    const found = await ask();
    if (found !== null && found !== undefined && found !== false) return found;
    if (performance.now() > end) throw new Error(`waited in vain for ${what}`);
    await new Promise((resolve) => setTimeout(resolve, 5));
  }
}
