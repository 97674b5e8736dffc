import type { Cable } from '#shared/contracts/cables.ts';
import { CableChoice } from './cable-choice.tsx';
import { FormSection } from './form-section.tsx';

export function CableFields({ cables }: { cables: readonly Cable[] }) {
  return (
    <FormSection title="The two cables" lede="What listeners hear as which is drawn; the order here means nothing.">
      <CableChoice index={0} label="One cable" cables={cables} />
      <CableChoice index={1} label="The other cable" cables={cables} />
    </FormSection>
  );
}
