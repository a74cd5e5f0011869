// jsdom lacks these browser features, on which charts, deferred views and the theme rely.
class Unobserved {
  observe(): void {
    return;
  }
  unobserve(): void {
    return;
  }
  disconnect(): void {
    return;
  }
}

/** Nothing comes into view: deferred views stay at their placeholder. */
class UnseenIntersections extends Unobserved {
  readonly root = null;
  readonly rootMargin = '';
  readonly scrollMargin = '';
  readonly thresholds = [];
  takeRecords(): [] {
    return [];
  }
}

globalThis.ResizeObserver ??= Unobserved;
globalThis.IntersectionObserver ??= UnseenIntersections;
globalThis.matchMedia ??= (media) =>
  Object.assign(new EventTarget(), {
    media,
    matches: false,
    onchange: null,
    addListener: () => undefined,
    removeListener: () => undefined,
  });
