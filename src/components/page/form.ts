/**
 * Sends a form marked `data-json` as JSON, so that what was typed survives a refusal. Without scripts the same form
 * posts as it is and the server redirects.
 */
interface Problem {
  title?: string;
  detail?: string;
  errors?: { path?: string; problem: string }[];
}

function show(form: HTMLFormElement, problem: Problem): void {
  const box = form.querySelector<HTMLElement>('[data-problem]');
  if (!box) return;
  const [field] = problem.errors ?? [];
  const input = field?.path ? form.elements.namedItem(field.path) : null;
  const label =
    input instanceof HTMLInputElement ? (input.labels?.[0]?.textContent?.trim() ?? field?.path) : field?.path;
  const detail = field ? `${label ?? ''}: ${field.problem}.` : (problem.detail ?? '');
  box.textContent = field ? detail : `${problem.title ?? 'That did not work'}. ${detail}`.trim();
  box.hidden = false;
  for (const element of form.querySelectorAll('[aria-invalid]')) element.removeAttribute('aria-invalid');
  if (input instanceof HTMLInputElement) {
    input.setAttribute('aria-invalid', 'true');
    input.focus();
  }
}

async function send(form: HTMLFormElement, submitter: HTMLElement | null): Promise<void> {
  const data = Object.fromEntries(new FormData(form, submitter));
  submitter?.setAttribute('aria-disabled', 'true');
  try {
    const answer = await fetch(form.action, {
      method: 'POST',
      headers: { 'content-type': 'application/json', accept: 'application/json' },
      body: JSON.stringify(data),
    });
    if (answer.ok) location.assign(form.dataset['then'] ?? '/');
    else show(form, (await answer.json()) as Problem);
  } catch {
    show(form, { title: 'The server did not answer', detail: 'Nothing was sent; try again.' });
  } finally {
    submitter?.removeAttribute('aria-disabled');
  }
}

for (const form of document.querySelectorAll<HTMLFormElement>('form[data-json]')) {
  form.addEventListener('submit', (event) => {
    event.preventDefault();
    void send(form, event.submitter);
  });
}

for (const button of document.querySelectorAll<HTMLButtonElement>('button[data-reveals]')) {
  button.addEventListener('click', () => {
    const input = document.getElementById(button.dataset['reveals'] ?? '');
    if (!(input instanceof HTMLInputElement)) return;
    const hidden = input.type === 'password';
    input.type = hidden ? 'text' : 'password';
    button.textContent = hidden ? 'hide' : 'show';
  });
}
