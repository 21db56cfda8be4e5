import { computed, inject, unref, type InjectionKey, type MaybeRef } from 'vue'
import * as units from '~/shared/utils/units'
import type { UnitSystem } from '~/shared/utils/units'

/** The person's own system of units, provided once by the frame around the page. */
export const unitSystemKey: InjectionKey<MaybeRef<UnitSystem>> = Symbol('unit system')

/** Formatters in the units this person reads. Call the result inside a template or computed: it follows the setting. */
export function useUnits() {
  const provided = inject(unitSystemKey, 'us')
  const system = computed<UnitSystem>(() => unref(provided))
  return {
    system,
    weight: (lb: number) => units.formatWeight(lb, system.value),
    length: (ft: number) => units.formatLength(ft, system.value),
    inches: (inches: number) => units.formatInches(inches, system.value),
    load: (psf: number) => units.formatLoad(psf, system.value),
    area: (ft2: number) => units.formatArea(ft2, system.value),
    width: (mm: number) => units.formatWidth(mm, system.value),
    rate: (mmPerYear: number) => units.formatRate(mmPerYear, system.value),
    share: units.formatShare,
    weightUnit: computed(() => (system.value === 'us' ? 'lb' : 'kg')),
    weightShown: (lb: number) => (system.value === 'us' ? lb : units.lbToKg(lb)),
    /** For boxes that are typed into: the length as shown, and back to feet. */
    lengthBox: {
      unit: computed(() => (system.value === 'us' ? 'ft' : 'm')),
      shown: (ft: number) => Number((system.value === 'us' ? ft : units.ftToM(ft)).toFixed(2)),
      toFt: (shown: number) => (system.value === 'us' ? shown : units.mToFt(shown)),
    },
  }
}
