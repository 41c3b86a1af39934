/** Where links in mail lead. The process that serves people knows its own address; without one no act that writes mail may pass. */
export function appOrigin(source: Readonly<Record<string, string | undefined>> = process.env): string {
  const url = source['APP_URL'];
  if (!url) throw new Error('APP_URL is not set; expected the address under which people reach the application.');
  return new URL(url).origin;
}
