import { useFieldTimeZone } from '../../api/fields';
import { usePlan } from '../../api/plans';
import { useMe } from '../../session/session-provider';
import { BackLink } from '../../ui/layout/back-link';
import { Screen } from '../../ui/layout/screen';
import { Failed, Loading } from '../../ui/layout/states';
import { BuildForm } from './components/build-form';
import { usePlanDefaults } from './queries';

interface BuildPlanScreenProps {
  fieldId: string;
  /** The plan whose request the form starts from; without one it starts from last week and the calendar. */
  like: string | null;
}

export function BuildPlanScreen({ fieldId, like }: BuildPlanScreenProps) {
  const fieldName = useMe()?.memberships.find((membership) => membership.fieldId === fieldId)?.fieldName;
  return (
    <Screen
      title="Build a plan"
      of={fieldName}
      intro="Say which weeks and how much heat. The plan keeps every limit, delivers the heat, and disturbs the ground least."
      above={<BackLink href={{ pathname: '/fields/[fieldId]/plans', params: { fieldId } }}>Plans</BackLink>}
    >
      <Form fieldId={fieldId} like={like} />
    </Screen>
  );
}

function Form({ fieldId, like }: BuildPlanScreenProps) {
  const defaults = usePlanDefaults(fieldId);
  const zone = useFieldTimeZone(fieldId);
  const earlier = usePlan(fieldId, like);
  if (defaults.data && zone.data && (like === null || earlier.data)) {
    return (
      <BuildForm
        fieldId={fieldId}
        defaults={defaults.data}
        request={earlier.data?.request ?? defaults.data.request}
        timeZone={zone.data}
      />
    );
  }
  const parts = [defaults, zone, earlier];
  const error = parts.find((part) => part.error)?.error;
  if (!error) return <Loading what="the form" />;
  return <Failed what="The form" error={error} retry={() => parts.forEach((part) => void part.refetch())} />;
}
