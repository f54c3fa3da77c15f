import { useState, type KeyboardEvent } from 'react';
import { TipCard, type Tip } from './tip';

type Shown = { tip: Tip; x: number; y: number };

/** Hover and focus for drawings of our own: what to spread on each thing, and the card to place beside it. */
export function useTip(widthPx: number) {
  const [shown, setShown] = useState<Shown | null>(null);
  const hide = () => setShown(null);
  const on = (next: Shown) => ({
    onPointerEnter: () => setShown(next),
    onPointerLeave: hide,
    onFocus: () => setShown(next),
    onBlur: hide,
    onKeyDown: (event: KeyboardEvent) => {
      if (event.key === 'Escape') hide();
    },
  });
  const isRight = shown !== null && shown.x > widthPx / 2;
  const card = shown && (
    <div
      aria-hidden="true"
      className="pointer-events-none absolute z-10"
      style={{ top: shown.y, ...(isRight ? { right: widthPx - shown.x } : { left: shown.x }) }}
    >
      <TipCard tip={shown.tip} />
    </div>
  );
  return { on, card };
}
