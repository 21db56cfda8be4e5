import type { MaybeRefOrGetter } from 'vue'
import { pathWith } from '~/composables/queries/pathWith'
import { useServerQuery } from '~/composables/useServerQuery'
import type { RecordPage } from '#shared/types/record'

export interface RecordFilter { after?: string, subject?: string, [more: string]: string | undefined }

export const useUnitRecord = (unitId: MaybeRefOrGetter<string>, filter: MaybeRefOrGetter<RecordFilter>) => useServerQuery<RecordPage>({
  key: () => ['record', toValue(unitId), toValue(filter)], path: () => pathWith(`/api/units/${toValue(unitId)}/record`, toValue(filter)), essential: true, keepPrevious: true,
})
