import type { Message } from './message.js';

export interface RenderedMessage {
  text: string;
  html: string;
}

/**
 * A message as HTML and as plain text with the same words. Colours stand inline for light ground; where a reader's
 * program asks for dark ones the style sheet in the head replaces them. Nothing is loaded from anywhere.
 * @param sender who writes, as the head of the message names it
 */
export function renderMessage(message: Message, sender: string): RenderedMessage {
  return { text: asText(message, sender), html: asHtml(message, sender) };
}

/** Lines of text are left as long as they are: RFC 3676 leaves it to the reader's program to fold them. */
function asText(message: Message, sender: string): string {
  const { heading, facts, paragraphs, quote, items, action, reason } = message;
  const blocks = [
    sender,
    heading,
    facts.map(([caption, value]) => `${caption}: ${value}`).join('\n'),
    ...paragraphs,
    quote === undefined ? '' : quote.replace(/^/gm, '> '),
    (items ?? []).map((item) => `- ${item}`).join('\n'),
    action ? `${action.label}:\n${action.href}` : '',
    `-- \n${reason}`,
  ];
  return `${blocks.filter((block) => block !== '').join('\n\n')}\n`;
}

const colours = {
  paper: '#F7F3EA',
  sheet: '#FFFDF8',
  rule: '#DED6C5',
  ink: '#1B2430',
  soft: '#5A6471',
  act: '#1F4E8C',
} as const;

const dark = {
  paper: '#14171B',
  sheet: '#1A1E23',
  rule: '#31383F',
  ink: '#ECE6DA',
  soft: '#A2A8AF',
  act: '#8FB6EC',
};

const darkStyle = `@media (prefers-color-scheme: dark) {
.paper { background: ${dark.paper} !important; }
.sheet { background: ${dark.sheet} !important; border-color: ${dark.rule} !important; }
.rule { border-color: ${dark.rule} !important; }
.ink { color: ${dark.ink} !important; border-color: ${dark.ink} !important; }
.soft { color: ${dark.soft} !important; }
.act { color: ${dark.paper} !important; background: ${dark.act} !important; }
.link { color: ${dark.act} !important; }
}`;

function asHtml(
  { heading, facts, paragraphs, quote, items, action, reason }: Message,
  sender: string,
): string {
  const paragraph = (words: string) =>
    `<p class="ink" style="margin:0 0 12px;color:${colours.ink}">${lines(words)}</p>`;
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<meta name="supported-color-schemes" content="light dark">
<title>${escaped(heading)}</title>
<style>${darkStyle}</style>
</head>
<body class="paper" style="margin:0;padding:24px 12px;background:${colours.paper}">
<div class="sheet" style="max-width:600px;margin:0 auto;padding:24px;background:${colours.sheet};border:1px solid ${colours.rule};border-radius:3px;font:16px/1.45 'IBM Plex Sans',Helvetica,Arial,sans-serif">
<p class="soft" style="margin:0 0 4px;font-size:12px;color:${colours.soft}">${escaped(sender)}</p>
<h1 class="ink" style="margin:0 0 16px;padding:0 0 8px;border-bottom:2px solid ${colours.ink};font-size:20px;line-height:1.25;color:${colours.ink}">${escaped(heading)}</h1>
${factList(facts)}
${paragraphs.map(paragraph).join('\n')}
${quote === undefined ? '' : `<blockquote class="ink rule" style="margin:0 0 12px;padding:0 0 0 12px;border-left:2px solid ${colours.rule};color:${colours.ink}">${lines(quote)}</blockquote>`}
${items === undefined || items.length === 0 ? '' : `<ul class="ink" style="margin:0 0 12px;padding:0 0 0 20px;color:${colours.ink}">${items.map((item) => `<li>${lines(item)}</li>`).join('')}</ul>`}
${action ? actionLink(action) : ''}
<p class="soft rule" style="margin:20px 0 0;padding:12px 0 0;border-top:1px solid ${colours.rule};font-size:12px;color:${colours.soft}">${lines(reason)}</p>
</div>
</body>
</html>
`;
}

function factList(facts: Message['facts']): string {
  if (facts.length === 0) return '';
  const entries = facts.map(
    ([caption, value]) =>
      `<dt class="soft" style="margin:0;font-size:12px;color:${colours.soft}">${escaped(caption)}</dt>` +
      `<dd class="ink" style="margin:0 0 8px;color:${colours.ink}">${lines(value)}</dd>`,
  );
  return `<dl class="rule" style="margin:0 0 16px;padding:0 0 8px;border-bottom:1px solid ${colours.rule}">${entries.join('')}</dl>`;
}

/** The address stands in the open below the button: who is careful reads it before following. */
function actionLink({ label, href }: NonNullable<Message['action']>): string {
  const address = escaped(href);
  const attributes = `href="${address}" target="_blank" rel="noopener noreferrer"`;
  return (
    `<p style="margin:16px 0 8px"><a class="act" ${attributes} style="display:inline-block;padding:8px 16px;border-radius:3px;background:${colours.act};color:${colours.sheet};text-decoration:none">${escaped(label)}</a></p>` +
    `<p style="margin:0 0 12px;font-size:12px;overflow-wrap:anywhere"><a class="link" ${attributes} style="color:${colours.act}">${address}</a></p>`
  );
}

/** Text as it may stand in HTML and in its attributes (HTML, 13.3). */
export function escaped(text: string): string {
  const entities: Record<string, string> = {
    '&': '&amp;',
    '<': '&lt;',
    '>': '&gt;',
    '"': '&quot;',
    "'": '&#39;',
  };
  return text.replace(/[&<>"']/g, (character) => entities[character] ?? character);
}

const lines = (text: string): string => escaped(text).replace(/\n/g, '<br>');
