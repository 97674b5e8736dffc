import type { RegisteredAnalysis } from './registered-analysis.ts';

type Registered = Pick<
  RegisteredAnalysis,
  'alternative' | 'missing' | 'undecided' | 'direction' | 'margin' | 'stopping' | 'exclusions'
>;

/** What is registered about the analysis, in the words of every page that shows a protocol. */
export function analysisFacts(analysis: Registered): { label: string; value: string }[] {
  const { alternative, missing, undecided, direction, margin, stopping, exclusions } = analysis;
  return [
    { label: 'Test', value: `exact, ${alternative === 'greater' ? 'one-sided' : 'two-sided'}` },
    ...(direction === undefined ? [] : [{ label: 'Direction', value: `fixed in advance: ${direction}` }]),
    ...(margin === undefined
      ? []
      : [{ label: 'Margin', value: `${Number(margin) * 100}\u00a0%, shown by a one-sided 95\u00a0% limit` }]),
    { label: 'Missing answers', value: missing },
    ...(undecided === undefined
      ? []
      : [{ label: 'No preference', value: `offered, ${undecided} of the test and stated` }]),
    { label: 'Stopping', value: stopping },
    { label: 'Exclusions', value: exclusions },
  ];
}
