import { CLUTCH_SUPERSESSION } from './catalog';
import type { Component, Life } from './components';
import { COMPONENTS } from './components';
import type { Unit } from './fleet';
import { modelsOfFamily } from './makers';
import type { Random } from './random';

interface Slot {
  component: Component;
  failsAtHours: number;
}

/** What is built into one machine and when each piece will give out, in the machine's operating hours. */
export interface Wear {
  slots: readonly Slot[];
  next(): Slot | undefined;
  install(component: Component, hours: number, isKit?: boolean): void;
  /** A cure without a part buys some hours. */
  extend(component: Component, hours: number, byHours: number): void;
  /** Its failing is being told elsewhere. */
  suspend(component: Component): void;
}

/** A family's own lives are as they are on its machines; the others stretch with how the machine is built. */
function lifeOf(component: Component, unit: Unit, isKit: boolean): Life | undefined {
  if (isKit) return CLUTCH_SUPERSESSION.newLife;
  const { familyLife, life } = component;
  if (familyLife && modelsOfFamily(familyLife.family).has(unit.model.model)) return familyLife.life;
  return life && { shape: life.shape, scaleHours: life.scaleHours * unit.model.toughness };
}

export function createWear(unit: Unit, random: Random): Wear {
  const draw = (component: Component, isKit: boolean): number => {
    const life = lifeOf(component, unit, isKit);
    return life ? random.weibull(life.shape, life.scaleHours, unit.frailty) : Infinity;
  };
  const slots = COMPONENTS.filter(({ builds, life }) => life && builds.includes(unit.model.build)).map(
    (component): Slot => ({ component, failsAtHours: draw(component, false) }),
  );
  const slotOf = (component: Component): Slot | undefined =>
    slots.find((slot) => slot.component === component);
  return {
    slots,
    next: () => slots.reduce((first, slot) => (slot.failsAtHours < first.failsAtHours ? slot : first)),
    install: (component, hours, isKit = false) => {
      const slot = slotOf(component);
      if (slot) slot.failsAtHours = hours + draw(component, isKit);
    },
    extend: (component, hours, byHours) => {
      const slot = slotOf(component);
      if (slot) slot.failsAtHours = hours + byHours;
    },
    suspend: (component) => {
      const slot = slotOf(component);
      if (slot) slot.failsAtHours = Infinity;
    },
  };
}
