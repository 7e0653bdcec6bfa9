import { useWindowDimensions } from 'react-native';

const RAIL_FROM = 840;
const ROOMY_FROM = 600;
const TWO_PANES_FROM = 1100;

export function useWidth() {
  const { width } = useWindowDimensions();
  return {
    width,
    isRoomy: width >= ROOMY_FROM,
    hasRail: width >= RAIL_FROM,
    hasTwoPanes: width >= TWO_PANES_FROM,
    gutter: width >= ROOMY_FROM ? 24 : 16,
  };
}
