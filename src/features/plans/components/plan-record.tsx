import { useState } from 'react';
import { View } from 'react-native';

import type { PlanDetail } from '../../../contract/plans';
import { counted, fixed, momentName, THIN_SPACE } from '../../../lib/format';
import { saveTextFile } from '../../../lib/platform/save-file';
import { isOpenJob } from '../../../lib/words';
import { Button } from '../../../ui/button';
import { ConfirmDialog } from '../../../ui/dialog/confirm-dialog';
import { Facts } from '../../../ui/facts';
import { Section } from '../../../ui/layout/section';
import { SPACE } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { useScenarioFile, useWithdrawPlan } from '../queries';

/** Who made it, from what, and what can be done with it. */
export function PlanRecord({ fieldId, detail }: { fieldId: string; detail: PlanDetail }) {
  const { plan, can } = detail;
  if (plan.jobState && isOpenJob(plan.jobState)) return null;
  return (
    <Section
      title="Record"
      intro="The scenario file holds every input: it replays this plan to the same numbers."
    >
      <Facts facts={factsOf(detail)} />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.one }}>
        <ScenarioButton fieldId={fieldId} detail={detail} />
        {can.withdraw && <WithdrawButton fieldId={fieldId} planId={plan.id} number={plan.number} />}
      </View>
    </Section>
  );
}

function factsOf({ plan, result, timeZone }: PlanDetail) {
  const built = [
    { name: 'Built by', value: plan.builtBy.name },
    { name: 'Built', value: `${momentName(plan.createdAt, timeZone)} (${timeZone})` },
    ...(plan.notes ? [{ name: 'Notes', value: plan.notes }] : []),
  ];
  if (!result) return built;
  return [
    ...built,
    { name: 'Model version', value: result.modelVersion },
    {
      name: 'Computed in',
      value: `${fixed(result.seconds, 1)}${THIN_SPACE}s, ${counted(result.rounds, 'round')}`,
    },
    { name: 'Input hash', value: result.inputHash },
  ];
}

function ScenarioButton({ fieldId, detail }: { fieldId: string; detail: PlanDetail }) {
  const scenario = useScenarioFile(fieldId, detail.plan.id);
  const download = async () => {
    const file = await scenario.mutateAsync();
    await saveTextFile(`plan-${detail.plan.number}.scenario.json`, `${JSON.stringify(file, null, 2)}\n`);
  };
  return (
    <View style={{ gap: SPACE.half }}>
      <Button icon="download" onPress={() => void download().catch(() => {})} busy={scenario.isPending}>
        Download the scenario
      </Button>
      {scenario.error && (
        <Words tone="danger" role="alert">
          {scenario.error.message}
        </Words>
      )}
    </View>
  );
}

function WithdrawButton({ fieldId, planId, number }: { fieldId: string; planId: string; number: number }) {
  const [isAsking, setIsAsking] = useState(false);
  const withdrawing = useWithdrawPlan(fieldId, planId);
  return (
    <>
      <Button icon="minus" onPress={() => setIsAsking(true)}>
        Withdraw the plan
      </Button>
      <ConfirmDialog
        title={`Withdraw plan ${number}?`}
        verb="Withdraw"
        isOpen={isAsking}
        isBusy={withdrawing.isPending}
        error={withdrawing.error?.message}
        onClose={() => setIsAsking(false)}
        onConfirm={() => withdrawing.mutate(undefined, { onSuccess: () => setIsAsking(false) })}
      >
        It leaves the live plans and cannot come back. Its numbers stay on record.
      </ConfirmDialog>
    </>
  );
}
