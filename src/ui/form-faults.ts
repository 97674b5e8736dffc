import type { FieldErrors } from 'react-hook-form';

/** What is wrong with the form as a whole: everything set on `root` or below it. */
export function formFaults(errors: FieldErrors): string[] {
  const root = errors.root;
  if (!root) return [];
  return [root, ...Object.values(root)].flatMap((fault) => {
    const message = typeof fault === 'object' ? fault.message : undefined;
    return typeof message === 'string' && message !== '' ? [message] : [];
  });
}

/** How many fields carry a fault, however deep they lie. */
export function countFieldFaults(errors: FieldErrors): number {
  return Object.entries(errors).reduce((sum, [name, fault]) => (name === 'root' ? sum : sum + countFaults(fault)), 0);
}

function countFaults(fault: unknown): number {
  if (typeof fault !== 'object' || fault === null || fault instanceof Element) return 0;
  const isFault =
    ('type' in fault && typeof fault.type === 'string') || ('message' in fault && typeof fault.message === 'string');
  if (isFault) return 1;
  return Object.values(fault).reduce<number>((sum, inner) => sum + countFaults(inner), 0);
}
