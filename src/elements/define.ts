/** Defines an element once; does nothing where there are no elements, such as on a server. */
export function define(name: string, element: CustomElementConstructor): void {
  if (typeof customElements === 'undefined' || customElements.get(name)) return;
  customElements.define(name, element);
}
