/** An element's content: "@name" an attribute, "#" the text, any other name the child or children of that name. */
export type XmlTree = { [name: string]: string | undefined | XmlTree | (string | XmlTree)[] };

const entities: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;', '\t': '&#9;', '\n': '&#10;', '\r': '&#13;' };

/** What XML 1.0 cannot hold even as a reference: most controls, half a surrogate pair, two non-characters. */
const impossible = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]|[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/g;

/** Text as it stands in XML or HTML, in content and in quoted attributes alike; what cannot stand there becomes U+FFFD. */
export const escapeXml = (text: string): string => text.replace(impossible, '\ufffd').replace(/[&<>"'\t\n\r]/g, (c) => entities[c] ?? c);

const element = (name: string, content: string | XmlTree, indent: string): string => {
  if (typeof content === 'string') return `${indent}<${name}>${escapeXml(content)}</${name}>\n`;
  let attributes = '';
  let text = '';
  let children = '';
  for (const [key, value] of Object.entries(content)) {
    if (value === undefined) continue;
    if (typeof value === 'string' && key === '#') text = escapeXml(value);
    else if (typeof value === 'string' && key.startsWith('@')) attributes += ` ${key.slice(1)}="${escapeXml(value)}"`;
    else for (const child of Array.isArray(value) ? value : [value]) children += element(key, child, `${indent}  `);
  }
  if (children === '') return text === '' ? `${indent}<${name}${attributes}/>\n` : `${indent}<${name}${attributes}>${text}</${name}>\n`;
  return `${indent}<${name}${attributes}>\n${children}${indent}</${name}>\n`;
};

/**
 * A document with one root. Own code, because the library at hand reads "&lt;" in a given text as "<": a title would not
 * come back as it was. Names come from us, never from data.
 */
export const writeXml = (root: XmlTree): string => `<?xml version="1.0" encoding="UTF-8"?>\n${Object.entries(root).map(([name, content]) => element(name, content as string | XmlTree, '')).join('')}`;
