import { Section } from '../../../ui/layout/section';
import { FormField } from './form-field';
import { type FormPart } from './form-parts';

export function NameFields({ control, onSubmit }: FormPart) {
  return (
    <Section title="Name and notes">
      <FormField control={control} name="name" label="Name" onSubmit={onSubmit} />
      <FormField
        control={control}
        name="notes"
        label="Notes"
        lines={3}
        hint="What those who read the plan should know. Optional."
        onSubmit={onSubmit}
      />
    </Section>
  );
}
