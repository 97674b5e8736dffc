import { type Comparison, compare, type Expected, type Kind } from './compare.ts';

export interface ReferenceRecord {
  readonly id: string;
  readonly fn: string;
  readonly inputs: unknown;
  readonly expected: { readonly [field: string]: Expected };
  readonly tol: number;
}

/** The fields of one record as computed here, by the kind of their comparison. */
export type Outcome = { readonly [kind in Kind]?: { readonly [field: string]: unknown } };

/** One function of the check values, in terms of functions of shared/; null where it belongs to a method not there yet. */
export type Mapping = (inputs: unknown) => Outcome;

/** What has no function yet, or differs on purpose, each with the reason. */
export interface Pending {
  /** `fn`, `fn.field` for one field of it, or `fn method` for the records of one method. */
  readonly functions: { readonly [name: string]: string };
  /** Ids of records. */
  readonly records: { readonly [id: string]: string };
}

export interface Line {
  readonly fn: string;
  readonly cases: number;
  readonly largestError: number;
  /** False where no value of it was computed here. */
  readonly isCompared: boolean;
  readonly failures: readonly string[];
  /** Why nothing, or not everything, was compared. */
  readonly pending: readonly string[];
}

/**
 * Compares records with what shared/ computes, function by function.
 *
 * A function without a mapping, a field that the mapping does not give, and an error thrown are failures, unless the
 * pending list names them; an entry of that list that is not needed is one too.
 */
export function checkRecords(
  records: readonly ReferenceRecord[],
  mappings: { readonly [fn: string]: Mapping },
  pending: Pending,
): Line[] {
  const names = [...new Set(records.map(({ fn }) => fn))];
  return names.map((fn) =>
    checkFunction(
      fn,
      records.filter((record) => record.fn === fn),
      mappings[fn],
      pending,
    ),
  );
}

function checkFunction(
  fn: string,
  records: readonly ReferenceRecord[],
  mapping: Mapping | undefined,
  pending: Pending,
): Line {
  const line = { fn, cases: records.length, largestError: 0, isCompared: mapping !== undefined };
  const reason = pending.functions[fn];
  if (mapping === undefined) {
    const failures = reason === undefined ? [`${fn}: no function here, and not pending`] : [];
    return { ...line, failures, pending: reason === undefined ? [] : [reason] };
  }
  const failures = reason === undefined ? [] : [`${fn} is pending and has a function`];
  const reasons = new Set<string>();
  let largestError = 0;
  for (const record of records) {
    const differs = pending.records[record.id] ?? pending.functions[`${fn} ${methodOf(record)}`];
    const faults: string[] = [];
    for (const { field, agrees, error } of compareRecord(record, mapping)) {
      const waits = pending.functions[`${fn}.${field}`];
      if (waits !== undefined) reasons.add(`${field}: ${waits}`);
      else if (!agrees) faults.push(`${record.id} ${field}`);
      else largestError = Math.max(largestError, error);
    }
    if (differs === undefined) failures.push(...faults);
    else if (faults.length === 0) failures.push(`${record.id} is pending and agrees`);
    else reasons.add(`${methodOf(record) ?? record.id}: ${differs}`);
  }
  return { ...line, largestError, failures, pending: [...reasons] };
}

function methodOf({ inputs }: ReferenceRecord): string | undefined {
  const { method } = inputs as { method?: string };
  return method;
}

function compareRecord(record: ReferenceRecord, mapping: Mapping): (Comparison & { field: string })[] {
  let outcome: Outcome;
  try {
    outcome = mapping(record.inputs);
  } catch (error) {
    return [{ field: `threw ${String(error)}`, agrees: false, error: 0 }];
  }
  return Object.entries(record.expected).map(([field, expected]) => {
    const kind = (['relative', 'scaled', 'exact'] as const).find((each) => field in (outcome[each] ?? {}));
    if (kind === undefined) return { field, agrees: false, error: 0 };
    return { field, ...compare(outcome[kind]?.[field], expected, record.tol, kind) };
  });
}
