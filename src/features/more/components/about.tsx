import { Facts } from '../../../ui/facts';
import { Section } from '../../../ui/layout/section';
import { Words } from '../../../ui/words';
import { useHealth } from '../queries';

/** Which version this is and what it must not be taken for. */
export function About() {
  const { data: health } = useHealth();
  return (
    <Section title="About Stillfield">
      <Facts
        facts={[
          { name: 'Version', value: health?.version ?? '–' },
          { name: 'Model version', value: health?.modelVersion ?? '–' },
          { name: 'Server', value: !health ? '–' : health.status === 'ok' ? 'in order' : 'needs attention' },
        ]}
      />
      <Words tone="quiet">
        Stillfield supports decisions. It controls no valve and replaces neither the permit’s protocol, nor
        local codes, nor licensed judgement. Its forecasts hold for the model of the ground that was accepted:
        stress from cooling and from the rock’s own stiffness is left out.
      </Words>
    </Section>
  );
}
