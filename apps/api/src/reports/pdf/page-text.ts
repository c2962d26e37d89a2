/** The part of the PDF library's stream object that pages are written to. */
interface ContentStream {
  write(chunk: string | Uint8Array): void;
  end(chunk?: string | Uint8Array): void;
}

/**
 * Has each page of a document keep its drawing operators as one text until it ends.
 *
 * The library makes a byte array of every operator, hundreds of thousands in a long report, and keeps them all while
 * pages are buffered. To be called before the first page is added; what is written stays the same to the last byte.
 */
export function keepPagesAsText(doc: PDFKit.PDFDocument): void {
  doc.on('pageAdded', () => {
    const { content } = doc.page as unknown as { content: ContentStream };
    const write = content.write.bind(content);
    const end = content.end.bind(content);
    let text = '';
    content.write = (chunk) => {
      text += `${typeof chunk === 'string' ? chunk : Buffer.from(chunk).toString('latin1')}\n`;
    };
    content.end = (chunk) => {
      write(Buffer.from(text, 'latin1'));
      text = '';
      end(chunk);
    };
  });
}
