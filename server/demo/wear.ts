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

function lifeOf(component: Component, unit: Unit, isKit: boolean): Life | undefined {
  if (isKit) return CLUTCH_SUPERSESSION.newLife;
  const special = component.familyLife;
  return special && modelsOfFamily(special.family).has(unit.model.model) ? special.life : component.life;
}

export function createWear(unit: Unit, random: Random, lifeFactor: number): Wear {
  const draw = (component: Component, isKit: boolean): number => {
    const life = lifeOf(component, unit, isKit);
    if (!life) return Infinity;
    return random.weibull(life.shape, life.scaleHours * lifeFactor * unit.model.toughness, unit.frailty);
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
