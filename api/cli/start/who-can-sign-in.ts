import { inventedPeople } from '#api/fakes/people.ts';

/** A short table of the invented people, for the terminal. */
export const whoCanSignIn = (): string => {
  const width = Math.max(...inventedPeople.map(({ name }) => name.length));
  return inventedPeople.map(({ name, part }) => `  ${name.padEnd(width)}  ${part}`).join('\n');
};
