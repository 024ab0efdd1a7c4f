import type { RouteLocationRaw } from 'vue-router';

/** Place of a span wire on the page of its section. */
export function spanLink(at: {
  readonly sectionId: string;
  readonly spanId: string;
  readonly spanWireId: string;
}): RouteLocationRaw {
  return { path: `/sections/${at.sectionId}`, query: { span: at.spanId, wire: at.spanWireId } };
}
