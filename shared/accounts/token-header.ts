// The header in which the desk sends its session's token back; alone here, so that public pages load no more.
export const TOKEN_HEADER = 'X-Treenail-Token';
