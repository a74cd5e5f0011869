// jsdom lacks these browser features, on which charts and the shell rely.
class UnobservedResize {
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

globalThis.ResizeObserver ??= UnobservedResize;
globalThis.matchMedia ??= (media) =>
  Object.assign(new EventTarget(), {
    media,
    matches: false,
    onchange: null,
    addListener: () => undefined,
    removeListener: () => undefined,
  });
