import { expect, it } from 'vitest';
import { renderMessage } from './render-message.js';

const hostile = `<img src=x onerror="alert('1')"> & more`;

// HTML Living Standard, 13.1.4: in text and quoted attribute values these references stand for the characters.
it('lets no words of a person become markup', () => {
  const { html, text } = renderMessage(
    {
      heading: hostile,
      facts: [[hostile, hostile]],
      paragraphs: [hostile],
      quote: hostile,
      items: [hostile],
      action: { label: hostile, href: `https://lab.example/?q="onmouseover=1` },
      reason: hostile,
    },
    hostile,
  );
  expect(html).not.toContain('<img');
  expect(html).not.toContain('"onmouseover');
  expect(html.split('&lt;img src=x onerror=&quot;alert(&#39;1&#39;)&quot;&gt; &amp; more')).toHaveLength(11);
  expect(text.split(hostile)).toHaveLength(10);
});

it('says the same in both forms', () => {
  const { html, text } = renderMessage(
    { heading: 'A', facts: [['Report', 'HR-0007']], paragraphs: ['Two\nlines'], reason: 'Because' },
    'Brackwater',
  );
  for (const words of ['Brackwater', 'HR-0007', 'Because']) {
    expect(html).toContain(words);
    expect(text).toContain(words);
  }
  expect(html).toContain('Two<br>lines');
  expect(text).toContain('Report: HR-0007');
});
