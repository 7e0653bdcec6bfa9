import { THIN_SPACE, type Quantity } from '../lib/format';
import { Words, type Size, type WordsProps } from './words';

const UNIT_SIZE: Record<Size, Size> = {
  figure: 'title',
  head: 'lead',
  title: 'body',
  lead: 'body',
  body: 'small',
  small: 'small',
};

/** A number with its unit set smaller, after a thin space. */
export function QuantityWords({
  quantity,
  size = 'body',
  tone,
  weight,
}: { quantity: Quantity } & Pick<WordsProps, 'size' | 'tone' | 'weight'>) {
  return (
    <Words size={size} tone={tone} weight={weight} tabular>
      {quantity.value}
      {quantity.unit !== '' && (
        <Words size={UNIT_SIZE[size]} tone={tone} weight={weight}>
          {THIN_SPACE + quantity.unit}
        </Words>
      )}
    </Words>
  );
}
