import type { AtticDetail, AtticListRow, KeptSurvey } from '~/shared/types/atticDetail'
import type { AtticSurvey } from '~/shared/types/attic'
import type { AtticEditValue } from '~/shared/schemas/attic'
import type { ListImported, ListPreview } from '~/shared/types/inventoryList'
import type { TermsPage } from '~/shared/types/storageTerms'
import type { AtticItemBulkValue, AtticItemEditValue, AtticItemMovesValue, AtticItemValue } from '~/shared/schemas/atticItem'

export const atticKey = (atticId: string) => ['attics', atticId]

export const useAttic = (atticId: string) =>
  useServerQuery<AtticDetail>({ key: atticKey(atticId), path: `/api/attics/${atticId}`, essential: true })

export const useAttics = (search: Ref<string>, after: Ref<string | undefined>) => useServerQuery<{ rows: AtticListRow[], next: string | null }>({
  key: () => ['attics', 'list', search.value, after.value],
  path: () => `/api/attics?${new URLSearchParams({ ...search.value && { search: search.value }, ...after.value && { after: after.value } })}`,
})

export const useKeptSurveys = (atticId: string) => useServerQuery<{ rows: KeptSurvey[] }>({ key: ['attics', atticId, 'surveys'], path: `/api/attics/${atticId}/surveys`, essential: true })

/** What changes when the load or the survey changes. */
const STALE = ['attics', 'units', 'overview', 'findings', 'properties', 'record']

const post = <V extends object>(path: (value: V) => string, bodyOf: (value: V) => object = value => value) =>
  useServerChange<V, unknown>({ stale: STALE, send: (request, value) => request(path(value), { method: 'POST', body: bodyOf(value) }) })

export const useKeepSurvey = (atticId: string) => post<AtticSurvey>(() => `/api/attics/${atticId}/surveys`)
export const useAddItem = (atticId: string) => post<AtticItemValue>(() => `/api/attics/${atticId}/items`)
export const useMoveItems = (atticId: string) => post<AtticItemMovesValue>(() => `/api/attics/${atticId}/moves`)
export const useConfirmInventory = (atticId: string) => post<{ confirmedOn: string }>(() => `/api/attics/${atticId}/inventory-confirmation`)
export const useChangeSeveral = (atticId: string) => post<AtticItemBulkValue>(() => `/api/attics/${atticId}/bulk`)
export const useWithdrawDocument = () => post<{ documentId: string }>(({ documentId }) => `/api/documents/${documentId}/withdrawal`, () => ({}))

export const useEditAttic = (atticId: string) => useServerChange<AtticEditValue, unknown>({
  stale: STALE, send: (request, edit) => request(`/api/attics/${atticId}`, { method: 'PATCH', body: edit }),
})
export const useArchiveAttic = (atticId: string) => post<{ version: number }>(() => `/api/attics/${atticId}/archive`)
export const useRestoreAttic = (atticId: string) => post<{ version: number }>(() => `/api/attics/${atticId}/restore`)

export const useEditItem = () => useServerChange<{ itemId: string, edit: AtticItemEditValue }, unknown>({
  stale: STALE, send: (request, { itemId, edit }) => request(`/api/items/${itemId}`, { method: 'PATCH', body: edit }),
})

export const useAddDocument = (atticId: string) => useServerChange<{ file: File, about: object }, unknown>({
  stale: STALE,
  send: (request, { file, about }) => {
    const form = new FormData()
    form.set('about', JSON.stringify(about))
    form.set('file', file)
    return request(`/api/attics/${atticId}/documents`, { method: 'POST', body: form })
  },
})

export const usePreviewList = (atticId: string) => (csv: string) =>
  $fetch<ListPreview>(`/api/attics/${atticId}/inventory-preview`, { method: 'POST', body: { csv } })
export const useImportList = (atticId: string) => useServerChange<{ csv: string, skipBad: boolean, key: string }, ListImported>({
  stale: STALE,
  send: (request, { key, ...body }) => request(`/api/attics/${atticId}/inventory-import`, { method: 'POST', body, headers: { 'idempotency-key': key } }),
})

export const useTerms = (atticId: string) => useServerQuery<TermsPage>({ key: ['attics', atticId, 'terms'], path: `/api/attics/${atticId}/terms`, essential: true })
export const useSignTerms = (atticId: string) => post<{ signedName: string, rules: string[] }>(() => `/api/attics/${atticId}/terms-signature`)
