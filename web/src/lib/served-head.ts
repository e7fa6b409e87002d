const served = '[data-served]';

/**
 * The server puts marks for machines into the head of an entry's page: title, description, canonical address, links, JSON-LD. The
 * title gives way at once, or it would stay in the tab beside the client's own; the others go when another page is opened.
 */
export const shedServedTitle = (): void => document.head.querySelector(`title${served}`)?.remove();
export const shedServedHead = (): void => document.head.querySelectorAll(served).forEach((mark) => mark.remove());
