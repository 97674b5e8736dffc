import { useState } from 'react';
import { NumberField } from '../../../ui/number-field.tsx';
import { usePlan } from '../planner/plan-context.ts';

const least = 50;
const most = 99;

/** How often a study is to find what is there. */
export function GoalField() {
  const { aim, setAim } = usePlan();
  const [text, setText] = useState(String(Math.round(aim.goal * 100)));
  const value = Number(text);
  const isSound = text.trim() !== '' && value >= least && value <= most;
  return (
    <NumberField
      label="Chance of finding it"
      unit="%"
      min={least}
      max={most}
      value={text}
      error={isSound ? undefined : `Enter ${least} to ${most} per cent.`}
      hint="How often, at least, a study should find this if it is there."
      onChange={(event) => {
        setText(event.target.value);
        const typed = Number(event.target.value);
        if (event.target.value.trim() !== '' && typed >= least && typed <= most) setAim({ goal: typed / 100 });
      }}
    />
  );
}
