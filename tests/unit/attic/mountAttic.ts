import { mount, RouterLinkStub } from '@vue/test-utils'
import type { Component } from 'vue'
import ItemScale from '../../../components/attic/ItemScale.vue'
import AtticVerdict from '../../../components/attic/AtticVerdict.vue'
import UiButton from '../../../components/ui/UiButton.vue'
import UiCheckbox from '../../../components/ui/UiCheckbox.vue'
import UiChoice from '../../../components/ui/UiChoice.vue'
import UiDay from '../../../components/ui/UiDay.vue'
import UiDisclosure from '../../../components/ui/UiDisclosure.vue'
import UiEmpty from '../../../components/ui/UiEmpty.vue'
import UiInput from '../../../components/ui/UiInput.vue'
import UiLive from '../../../components/ui/UiLive.vue'
import UiField from '../../../components/ui/UiField.vue'
import UiMeasure from '../../../components/ui/UiMeasure.vue'
import UiNotice from '../../../components/ui/UiNotice.vue'
import UiNumber from '../../../components/ui/UiNumber.vue'
import UiSafety from '../../../components/ui/UiSafety.vue'
import UiSelect from '../../../components/ui/UiSelect.vue'
import UiStateWord from '../../../components/ui/UiStateWord.vue'
import UiTable from '../../../components/ui/UiTable.vue'
import UiVerdict from '../../../components/ui/UiVerdict.vue'

const components = { AtticVerdict, ItemScale, UiButton, UiCheckbox, UiChoice, UiDay, UiDisclosure, UiEmpty, UiInput, UiLive, UiField, UiMeasure, UiNotice, UiNumber, UiSafety, UiSelect, UiStateWord, UiTable, UiVerdict } as Record<string, Component>

/** Mounts a component of the attic with the pieces Nuxt would have found for it. */
export function mountAttic(component: unknown, props: Record<string, unknown>) {
  return mount(component as Component, { attachTo: document.body, props, global: { components, stubs: { NuxtLink: RouterLinkStub } } } as Parameters<typeof mount>[1])
}

/** What a person reads, in one line. */
export const textOf = (wrapper: { text: () => string }) => wrapper.text().replace(/\s+/g, ' ')
