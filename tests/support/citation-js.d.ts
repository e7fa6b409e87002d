declare module '@citation-js/core' {
  export class Cite {
    constructor(data: unknown, options?: { forceType?: string });
    data: Record<string, unknown>[];
    format(kind: 'bibliography', options: { template: string; format: 'text'; lang?: string }): string;
  }
}
declare module '@citation-js/plugin-bibtex';
declare module '@citation-js/plugin-ris';
declare module '@citation-js/plugin-csl';
