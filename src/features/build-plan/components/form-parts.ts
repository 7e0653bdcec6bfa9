import type { Control } from 'react-hook-form';

import type { PlanForm } from '../plan-form';

export interface FormPart {
  control: Control<PlanForm>;
  /** Enter in any of the fields. */
  onSubmit: () => void;
}
