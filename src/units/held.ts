/** Text for a page, in which a figure is never parted from its unit at the end of a line: a no-break space stands between. */
export function held(text: string): string {
  return text.replace(/(\d) (?=(mm|cm|m|metres?|N|s|kg|%|paces?)(?![\p{L}\d]))/gu, '$1\u00a0')
}
