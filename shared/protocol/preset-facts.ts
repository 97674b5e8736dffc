import type { RigPreset } from './rig-preset.ts';

/** What a preset fixes, line by line, in the words of the pages that show a protocol. No line where there is none. */
export function presetFacts(preset: RigPreset | undefined): { label: string; value: string }[] {
  if (preset === undefined) return [];
  const steps = preset.steps.map(({ act, how, leastS }, index) => {
    const wait = leastS === 0 ? '' : ` (at least ${leastS} s)`;
    return `${index + 1}. ${act.replaceAll('{code}', 'the code')}${wait}: ${how.replaceAll('{code}', 'the code')}`;
  });
  return [
    { label: 'Rig preset', value: preset.name },
    { label: 'Steps of a change', value: steps.join('\n') },
    { label: 'Levels are measured', value: preset.levelsAt },
    { label: 'Cautions to tick', value: preset.cautions.join(', ') },
  ];
}
