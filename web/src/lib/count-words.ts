const small = ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine', 'Ten', 'Eleven', 'Twelve'];

/** "One check is", "Three checks are", "14 checks are": small numbers as words, as the sentences of the site do. */
export const countWords = (n: number, one: string, many: string): string => `${small[n] ?? n} ${n === 1 ? one : many}`;
