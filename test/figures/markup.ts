/** Elements of a piece of XML in order, with their attributes; throws where it is not well formed. */
export function parseMarkup(xml: string): { name: string; attributes: Map<string, string>; text: string }[] {
  const out: { name: string; attributes: Map<string, string>; text: string }[] = [];
  const stack: string[] = [];
  const pattern = /<(\/?)([A-Za-z][\w:-]*)((?:\s+[\w:-]+="[^"<]*")*)\s*(\/?)>|([^<]+)|(<)/g;
  for (const [, close, name, rest, empty, text, stray] of xml.matchAll(pattern)) {
    if (stray !== undefined) throw new Error(`a stray < among ${stack.join('/')}`);
    if (text !== undefined) {
      if (/&(?!(amp|lt|gt|quot|#39);)/.test(text) || text.includes('>')) throw new Error(`unescaped text "${text}"`);
      if (stack.length === 0 && text.trim() !== '') throw new Error(`text outside: ${text}`);
      if (out.length > 0) out[out.length - 1].text += text;
      continue;
    }
    if (close === '/') {
      if (stack.pop() !== name) throw new Error(`</${name}> closes nothing`);
      continue;
    }
    const attributes = new Map<string, string>();
    for (const [, key, value] of rest.matchAll(/([\w:-]+)="([^"]*)"/g)) {
      if (attributes.has(key)) throw new Error(`${key} comes twice on ${name}`);
      if (/&(?!(amp|lt|gt|quot|#39);)/.test(value)) throw new Error(`unescaped ${key}="${value}"`);
      attributes.set(key, value);
    }
    out.push({ name, attributes, text: '' });
    if (empty !== '/') stack.push(name);
  }
  if (stack.length > 0) throw new Error(`${stack.join('/')} left open`);
  return out;
}
