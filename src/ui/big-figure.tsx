import { View } from 'react-native';

import type { Quantity } from '../lib/format';
import { QuantityWords } from './quantity-words';
import { Words, type Tone } from './words';

interface BigFigureProps {
  quantity: Quantity;
  tone: Tone;
  name: string;
  note: string;
}

/** At most two of these on a screen. */
export function BigFigure({ quantity, tone, name, note }: BigFigureProps) {
  return (
    <View style={{ flexBasis: 150, flexGrow: 1, flexShrink: 1, maxWidth: 360 }}>
      <Words weight="medium">{name}</Words>
      <QuantityWords quantity={quantity} size="figure" tone={tone} weight="medium" />
      <Words tone="quiet">{note}</Words>
    </View>
  );
}
