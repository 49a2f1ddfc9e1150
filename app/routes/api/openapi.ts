export const loader = () => new Response('Placeholder', { status: 501 });
