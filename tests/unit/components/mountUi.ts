import { mount, RouterLinkStub, type VueWrapper } from '@vue/test-utils'
import type { Component, ComponentPublicInstance } from 'vue'

interface Mounting {
  props?: Record<string, unknown>
  slots?: Record<string, unknown>
  global?: { provide?: Record<string | symbol, unknown> }
}

/** Mounts a component as it stands on a page; links are plain anchors, since there is no router here. */
export function mountUi(component: unknown, { props, slots, global }: Mounting = {}): VueWrapper<ComponentPublicInstance> {
  const options = { attachTo: document.body, props, slots, global: { stubs: { NuxtLink: RouterLinkStub }, ...global } }
  return mount(component as Component, options as Parameters<typeof mount>[1])
}
