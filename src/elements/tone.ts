/** Whether the page around an element is light or dark. */
export type Tone = 'light' | 'dark';

/**
 * The tone of the page at an element: light text stands on dark ground. So it follows the page's own switch, whether
 * that is `color-scheme`, a media query or a class.
 */
export function toneAround(element: Element): Tone {
  const root = element.getRootNode();
  const around = element.parentElement ?? (root instanceof ShadowRoot ? root.host : null);
  if (!around) return 'light';
  const [red, green, blue] = (getComputedStyle(around).color.match(/[\d.]+/g) ?? []).map(Number);
  // Weights of the relative luminance of WCAG 2.2; close enough without its curve.
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue > 140 ? 'dark' : 'light';
}

/** Calls back when the page may have changed its tone; the result ends that. */
export function watchTone(onChange: () => void): () => void {
  const media = matchMedia('(prefers-color-scheme: dark)');
  const observer = new MutationObserver(onChange);
  media.addEventListener('change', onChange);
  for (const element of [document.documentElement, document.body]) {
    if (element) observer.observe(element, { attributes: true });
  }
  return () => {
    media.removeEventListener('change', onChange);
    observer.disconnect();
  };
}
