import type { BrowserContext } from 'playwright-core';
import { inventedPeople } from '#api/fakes/people.ts';

const unescaped = (text: string): string => text.replaceAll('&quot;', '"').replaceAll('&#39;', "'").replaceAll('&lt;', '<').replaceAll('&gt;', '>').replaceAll('&amp;', '&');

/** Signs a context in by the requests that the chooser makes, without drawing a page. The chooser itself is walked elsewhere. */
export const signInQuietly = async ({ request }: BrowserContext, name: string): Promise<void> => {
  const subject = inventedPeople.find((person) => person.name === name)?.subject;
  if (subject === undefined) throw new Error(`Nobody invented is called ${name}.`);
  const chooser = await request.get('/auth/google?returnTo=/');
  const hidden = [...(await chooser.text()).matchAll(/<input type="hidden" name="([^"]*)" value="([^"]*)">/g)];
  const form = Object.fromEntries(hidden.map(([, field, value]) => [unescaped(field ?? ''), unescaped(value ?? '')]));
  const answer = await request.post(new URL('/authorize', chooser.url()).href, { form: { ...form, subject } });
  const me = (await (await request.get('/api/v1/me')).json()) as { user: { name: string } | null };
  if (me.user?.name !== name) throw new Error(`${name} could not sign in: ${answer.url()} answered ${answer.status()}.`);
};
