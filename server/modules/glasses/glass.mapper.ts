import type { Glass as GlassResource, GlassSnapshot } from '#shared/contracts/glass.ts';

import type { Glass } from './glass.entity.ts';

export function toGlass(glass: Glass): GlassResource {
  return {
    ...toGlassSnapshot(glass),
    revision: glass.revision,
    retiredAt: glass.retiredAt?.toISOString() ?? null,
  };
}

/** The glass as a version remembers it. */
export function toGlassSnapshot(glass: Glass): GlassSnapshot {
  return {
    id: glass.id,
    name: glass.name,
    profile: glass.profile.map(({ heightMm, radiusMm }) => ({ heightMm, radiusMm })),
    stemMm: glass.stemMm,
    brimMl: glass.brimMl,
  };
}
