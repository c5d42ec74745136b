/** What the addresses in mails begin with. */
export const linkBase = (publicUrl: string) => publicUrl.replace(/\/+$/, '');
