import type { InventedPerson } from '../people.ts';

const escapes: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
const escaped = (text: string): string => text.replace(/[&<>"']/g, (sign) => escapes[sign] ?? sign);

/** Colours and measures of the registry's own pages. */
export const styleSheet = `
:root { --paper: #f6f3ec; --ink: #18222c; --muted: #4d5760; --rule: #d3ccbd; --edge: #807a6c; --sheet: #fdfcf9; --focus: #a3175f; color-scheme: light; }
@media (prefers-color-scheme: dark) { :root { --paper: #141a20; --ink: #ece6da; --muted: #aeb1ac; --rule: #343d45; --edge: #7c848a; --sheet: #0f1418; --focus: #f2a2c6; color-scheme: dark; } }
* { box-sizing: border-box; }
body { margin: 0; background: var(--paper); color: var(--ink); font: 1.0625rem/1.6 Georgia, serif; }
main { max-width: 38rem; margin: 0 auto; padding: 3.25rem 1.25rem; }
h1 { font-size: 2.125rem; line-height: 1.12; font-weight: 500; margin: 0 0 0.75rem; }
p { margin: 0 0 2.25rem; color: var(--muted); }
ul { list-style: none; margin: 0; padding: 0; border-top: 2px solid var(--ink); }
li { border-bottom: 1px solid var(--rule); }
button { display: grid; gap: 0.125rem; width: 100%; padding: 0.75rem 0.5rem; border: 0; background: none; color: inherit; font: inherit; text-align: left; cursor: pointer; }
button:hover { background: var(--sheet); }
button:focus-visible, a:focus-visible { outline: 3px solid var(--focus); outline-offset: 2px; }
button span { color: var(--muted); font: 0.9375rem/1.4 "Segoe UI", Arial, sans-serif; }
footer { margin-top: 2.25rem; font: 0.875rem/1.45 "Segoe UI", Arial, sans-serif; color: var(--muted); }
a { color: inherit; }
`;

const shell = (title: string, body: string): string =>
  `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><title>${escaped(title)}</title><link rel="stylesheet" href="/style.css"></head><body><main>${body}</main></body></html>`;

/** The chooser: one button a person. `request` carries the authorisation request back in hidden fields. */
export const chooserPage = (people: readonly InventedPerson[], request: Record<string, string>, cancelHref: string): string => {
  const hidden = Object.entries(request).map(([name, value]) => `<input type="hidden" name="${escaped(name)}" value="${escaped(value)}">`).join('');
  const rows = people.map(({ subject, name, part, email }) => `<li><button name="subject" value="${escaped(subject)}">${escaped(name)}<span>${escaped(part)} · ${escaped(email)}</span></button></li>`).join('');
  return shell('Choose who to be', `<h1>Choose who to be</h1><p>This registry runs on your own machine, so sign-in is a stand-in: these people are invented, and no password is asked for.</p><form method="post" action="/authorize">${hidden}<ul>${rows}</ul></form><footer><a href="${escaped(cancelHref)}">Go back without signing in</a></footer>`);
};

export const faultPage = (sentence: string): string => shell('Sign-in cannot go on', `<h1>Sign-in cannot go on</h1><p>${escaped(sentence)}</p>`);
