/** Hand a picture or table to the browser as a file of this name. */
export function download(content: Blob, name: string): void {
  const address = URL.createObjectURL(content);
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  // The browser has taken hold of the content by the next turn.
  setTimeout(() => URL.revokeObjectURL(address), 1000);
}
