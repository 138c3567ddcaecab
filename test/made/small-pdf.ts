/*
 * The smallest PDF that shows lines of text, written by hand after ISO 32000-1:
 * one page, one of the standard fonts, nothing compressed.
 */

/** The bytes of a PDF of one page with these lines, which are plain ASCII. */
export function smallPdf(lines: readonly string[]): Uint8Array {
  const shown = lines.map((line) => `(${line.replace(/[\\()]/g, '\\$&')}) Tj T*`).join('\n');
  const stream = `BT /F1 11 Tf 72 760 Td 16 TL\n${shown}\nET`;
  return new TextEncoder().encode(withObjects([
    '<< /Type /Catalog /Pages 2 0 R >>',
    '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
    '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 595 842] /Contents 4 0 R '
      + '/Resources << /Font << /F1 5 0 R >> >> >>',
    `<< /Length ${stream.length} >>\nstream\n${stream}\nendstream`,
    '<< /Type /Font /Subtype /Type1 /BaseFont /Helvetica >>',
  ]));
}

function withObjects(objects: readonly string[]): string {
  let file = '%PDF-1.4\n';
  const offsets = objects.map((object, index) => {
    const offset = file.length;
    file += `${index + 1} 0 obj\n${object}\nendobj\n`;
    return offset;
  });
  const entries = offsets.map((offset) => `${String(offset).padStart(10, '0')} 00000 n \n`);
  const table = `xref\n0 ${objects.length + 1}\n0000000000 65535 f \n${entries.join('')}`;
  const trailer = `trailer\n<< /Size ${objects.length + 1} /Root 1 0 R >>\n`;
  return `${file}${table}${trailer}startxref\n${file.length}\n%%EOF\n`;
}
