/** A mail before it is written out: the same content becomes plain text and simple HTML. */
export interface MailPage {
  subject: string;
  heading: string;
  lead: string;
  sections: { title: string; lines: readonly string[]; link?: { words: string; url: string } }[];
  action?: { words: string; url: string };
  foot: string;
}

export interface Rendered {
  subject: string;
  text: string;
  html: string;
}
