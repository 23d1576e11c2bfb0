/** Finds elements as a screen reader does: by role and accessible name. Enough of the rules for our components. */

const SELECTORS = {
  alert: '[role=alert]',
  button: 'button, [role=button], input[type=submit]',
  checkbox: 'input[type=checkbox], [role=checkbox]',
  combobox: 'select, [role=combobox]',
  dialog: '[role=dialog]',
  heading: 'h1, h2, h3, h4',
  link: 'a[href]',
  listitem: 'li',
  radio: 'input[type=radio], [role=radio]',
  row: 'tr',
  rowheader: 'th[scope=row]',
  slider: 'input[type=range], [role=slider]',
  table: 'table',
  textbox:
    'input:not([type]), input[type=text], input[type=email], input[type=search], input[type=date], textarea',
} as const;
type FoundRole = keyof typeof SELECTORS;

/** Every element of the role, and of the name where one is asked for. */
export function allByRole(root: ParentNode, role: FoundRole, name?: string | RegExp): HTMLElement[] {
  const found = [...root.querySelectorAll<HTMLElement>(SELECTORS[role])];
  return name === undefined ? found : found.filter((element) => matches(accessibleName(element), name));
}

/** The only element of the role and name; throws with the names that are there when it is not the only one. */
export function byRole<Found extends HTMLElement = HTMLElement>(
  root: ParentNode,
  role: FoundRole,
  name?: string | RegExp,
): Found {
  const found = allByRole(root, role, name);
  const [first] = found;
  if (found.length === 1 && first !== undefined) return first as Found;
  const present = allByRole(root, role).map((element) => `“${accessibleName(element)}”`);
  throw new Error(`${found.length} of role ${role} named ${String(name)}; there are ${present.join(', ')}`);
}

/** The only field of that name, of whatever kind: a password field has no role. */
export function fieldNamed(root: ParentNode, name: string | RegExp): HTMLInputElement {
  const fields = [...root.querySelectorAll<HTMLInputElement>('input, textarea, select')];
  const found = fields.filter((field) => matches(accessibleName(field), name));
  const [first] = found;
  if (found.length === 1 && first !== undefined) return first;
  const present = fields.map((field) => `“${accessibleName(field)}”`);
  throw new Error(`${found.length} fields named ${String(name)}; there are ${present.join(', ')}`);
}

/** Types into a field as a person does. */
export function typeInto(field: HTMLElement, text: string): void {
  (field as HTMLInputElement).value = text;
  field.dispatchEvent(new Event('input', { bubbles: true }));
  field.dispatchEvent(new Event('change', { bubbles: true }));
}

/** The words of an element as they are read out: a space between its parts, no white space of the template. */
export function textOf(element: Node): string {
  const parts = [...element.childNodes].map((child) =>
    child.nodeType === Node.TEXT_NODE ? (child.textContent ?? '') : textOf(child),
  );
  return parts.join(' ').replace(/\s+/g, ' ').trim();
}

function accessibleName(element: HTMLElement): string {
  const label = element.getAttribute('aria-label');
  if (label !== null) return label.trim();
  const labelledBy = element.getAttribute('aria-labelledby');
  if (labelledBy !== null) {
    return labelledBy
      .split(/\s+/)
      .map((id) => element.ownerDocument.getElementById(id))
      .map((labelling) => (labelling === null ? '' : textOf(labelling)))
      .join(' ');
  }
  const forId = element.id === '' ? null : element.ownerDocument.querySelector(`label[for="${element.id}"]`);
  const around = forId ?? element.closest('label');
  return textOf(around ?? element);
}

function matches(actual: string, expected: string | RegExp): boolean {
  return typeof expected === 'string' ? actual === expected : expected.test(actual);
}
