import { headerValue } from './headers';
import type { MailPage, Rendered } from './page';

const entities: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
/** Text for HTML content and quoted attributes. */
export const escapeHtml = (text: string): string => text.replace(/[&<>"']/g, (letter) => entities[letter] ?? letter);

function textOf(page: MailPage): string {
  const sections = page.sections.map((section) =>
    [
      section.title,
      ...section.lines.map((line) => `  ${line}`),
      ...(section.link ? [`  ${section.link.url}`] : []),
    ].join('\n'),
  );
  const action = page.action ? [`${page.action.words}:\n${page.action.url}`] : [];
  return `${[page.heading, page.lead, ...sections, ...action, page.foot].join('\n\n')}\n`;
}

// mail programs drop style sheets and scripts: styles stand on the elements, and there are no pictures to fetch
const style = {
  body: 'margin:0;padding:24px;background:#f4f2ec;color:#1d1d1b;font:16px/1.5 Arial,Helvetica,sans-serif',
  box: 'max-width:560px;margin:0 auto;padding:24px;background:#ffffff',
  heading: 'margin:0 0 12px;font-size:22px;line-height:1.25',
  lead: 'margin:0 0 16px',
  title: 'margin:20px 0 4px;font-size:17px;font-weight:bold',
  line: 'margin:0 0 4px',
  button:
    'display:inline-block;padding:12px 18px;background:#1d4d3a;color:#ffffff;text-decoration:none;font-weight:bold',
  foot: 'margin:24px 0 0;font-size:13px;color:#55534e',
};
const p = (css: string, text: string): string => `<p style="${css}">${escapeHtml(text)}</p>`;
const a = (url: string, words: string, css = 'color:#1d4d3a'): string =>
  `<a href="${escapeHtml(url)}" style="${css}">${escapeHtml(words)}</a>`;

function htmlOf(page: MailPage): string {
  const sections = page.sections.map(
    (section) =>
      `<h2 style="${style.title}">${escapeHtml(section.title)}</h2>` +
      section.lines.map((line) => p(style.line, line)).join('') +
      (section.link ? `<p style="${style.line}">${a(section.link.url, section.link.words)}</p>` : ''),
  );
  const action = page.action
    ? `<p style="margin:20px 0">${a(page.action.url, page.action.words, style.button)}</p>`
    : '';
  return [
    '<!doctype html><html lang="en"><head><meta charset="utf-8"><title>',
    escapeHtml(page.subject),
    `</title></head><body style="${style.body}"><div style="${style.box}">`,
    `<h1 style="${style.heading}">${escapeHtml(page.heading)}</h1>`,
    p(style.lead, page.lead),
    ...sections,
    action,
    p(style.foot, page.foot),
    '</div></body></html>\n',
  ].join('');
}

/** Writes a page out as subject, plain text and HTML. Names that people typed can't break a line anywhere in it. */
export function render(written: MailPage): Rendered {
  const page: MailPage = {
    ...written,
    subject: headerValue(written.subject),
    heading: headerValue(written.heading),
    lead: headerValue(written.lead, 1000),
    sections: written.sections.map((section) => ({
      ...section,
      title: headerValue(section.title, 500),
      lines: section.lines.map((line) => headerValue(line, 1000)),
    })),
  };
  return { subject: page.subject, text: textOf(page), html: htmlOf(page) };
}
