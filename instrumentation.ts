export async function register(): Promise<void> {
  if (process.env['NEXT_RUNTIME'] !== 'nodejs') return;
  const { register: registerNode } = await import('./instrumentation-node');
  registerNode();
}
