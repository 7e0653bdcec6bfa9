import { Controller, type Control, type FieldPathByValue } from 'react-hook-form';
import { type ReactNode } from 'react';

import { TextField } from '../../../ui/form/text-field';
import type { PlanForm } from '../plan-form';

interface FormFieldProps {
  control: Control<PlanForm>;
  name: FieldPathByValue<PlanForm, string>;
  label: string;
  unit?: string;
  kind?: 'text' | 'number';
  hint?: ReactNode;
  lines?: number;
  onSubmit: () => void;
}

/** A text field that belongs to the form. */
export function FormField({ control, name, onSubmit, ...field }: FormFieldProps) {
  return (
    <Controller
      control={control}
      name={name}
      render={({ field: { value, onChange, onBlur }, fieldState }) => (
        <TextField
          {...field}
          value={String(value)}
          onChange={onChange}
          onBlur={onBlur}
          error={fieldState.error?.message}
          onSubmit={field.lines === undefined ? onSubmit : undefined}
        />
      )}
    />
  );
}
