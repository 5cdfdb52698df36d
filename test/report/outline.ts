/** A picture by structure: one tag or text a line, numbers rounded, packed data, colour lists and style sheets left out. */
export function outline(svg: string): string {
  return svg
    .replace(/data:image\/png;base64,[^"]+/g, 'PNG')
    .replace(/data-values="[^"]+"/g, 'data-values="PACKED"')
    .replace(/<style>[^<]*<\/style>/g, '<style>STYLE</style>')
    .replace(/<stop[^>]*><\/stop>|<stop[^>]*\/>/g, '')
    .replace(/(?<![\w#])-?\d+\.\d+/g, (number) => String(Math.round(Number(number))))
    .replace(/></g, '>\n<');
}
