/**
 * Buttons and forms that call the API and show the page anew: `data-method` and `data-href` on the element, a form's
 * fields as JSON. What goes wrong is said in the nearest `[data-problem]`, and nothing typed is lost.
 */
function value(element: Element): unknown {
  if (element instanceof HTMLInputElement) {
    if (element.type === 'checkbox') return element.checked;
    if (element.type === 'number') return element.value === '' ? null : Number(element.value);
  }
  const field = element as HTMLInputElement | HTMLSelectElement | HTMLTextAreaElement;
  return field.value === '' && field.dataset['blank'] === 'null' ? null : field.value;
}

function fields(form: HTMLFormElement): Record<string, unknown> {
  const named = [...form.elements].filter((e) => e.getAttribute('name') && !(e instanceof HTMLButtonElement));
  return Object.fromEntries(named.map((e) => [e.getAttribute('name')!, value(e)]));
}

function say(from: Element, text: string): void {
  const box =
    from.closest('[data-scope]')?.querySelector<HTMLElement>('[data-problem]') ??
    document.querySelector<HTMLElement>('[data-problem]');
  if (!box) return;
  box.textContent = text;
  box.hidden = false;
}

/** What a form said before the page was shown anew. */
const SAID = 'driftwright.said';

/** @returns false where nothing was done */
async function act(element: HTMLElement, body?: unknown): Promise<boolean> {
  const { method = 'POST', href = '', then, confirms, says } = element.dataset;
  if (confirms && element.dataset['asked'] !== 'yes') {
    element.dataset['asked'] = 'yes';
    element.textContent = confirms;
    return false;
  }
  try {
    const answer = await fetch(href, {
      method,
      headers: body === undefined ? {} : { 'content-type': 'application/json' },
      body: body === undefined ? undefined : JSON.stringify(body),
    });
    if (answer.ok) {
      const shown = element.dataset['shows'];
      if (shown) {
        const made = (await answer.json()) as Record<string, string>;
        const output = document.querySelector<HTMLOutputElement>(shown);
        if (output) {
          output.value = made[output.name] ?? '';
          output.closest<HTMLElement>('[hidden]')?.removeAttribute('hidden');
        }
        return true;
      }
      if (says) sessionStorage.setItem(SAID, says);
      if (then)
        location.assign(
          then.replace(/\{(\w+)\}/g, (_, key: string) => String((body as Record<string, unknown>)[key])),
        );
      else location.reload();
      return true;
    }
    const problem = (await answer.json()) as {
      title: string;
      detail?: string;
      errors?: { path?: string; problem: string }[];
    };
    const [first] = problem.errors ?? [];
    say(
      element,
      first
        ? `${first.path ?? ''}: ${first.problem}`.replace(/^: /, '')
        : [problem.title, problem.detail].filter(Boolean).join('. '),
    );
  } catch {
    say(element, 'The server did not answer. Nothing was changed; try again.');
  }
  return false;
}

const said = document.querySelector<HTMLElement>('[data-said]');
if (said) said.textContent = sessionStorage.getItem(SAID);
sessionStorage.removeItem(SAID);

for (const button of document.querySelectorAll<HTMLButtonElement>('button[data-href]')) {
  button.addEventListener('click', () => void act(button));
  button.addEventListener('blur', () => {
    if (button.dataset['asked'] !== 'yes') return;
    button.dataset['asked'] = 'no';
    button.textContent = button.dataset['rest'] ?? button.textContent;
  });
}
for (const form of document.querySelectorAll<HTMLFormElement>('form[data-href]')) {
  form.addEventListener('submit', (event) => {
    event.preventDefault();
    void act(form, fields(form));
  });
}
for (const select of document.querySelectorAll<HTMLSelectElement>('select[data-href]')) {
  const before = select.value;
  select.addEventListener('change', () => {
    void act(select, { [select.name]: select.value }).then((done) => {
      if (!done) select.value = before;
    });
  });
}
