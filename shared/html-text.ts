// Text as it may stand in HTML, as content and between quotes.

const SIGNS: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

export const escapeHtml = (text: string): string => text.replaceAll(/[&<>"']/g, (sign) => SIGNS[sign] ?? '');
