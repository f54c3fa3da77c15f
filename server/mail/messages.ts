export type Message = { purpose: 'invite' | 'added' | 'reset'; subject: string; text: string };

type Invitation = { displayName: string; shopName: string; link: string };

export const inviteMessage = ({ displayName, shopName, link }: Invitation): Message => ({
  purpose: 'invite',
  subject: `${oneLine(shopName)} invites you to Witness Mark`,
  text: `Hello ${displayName},

${shopName} has made you an account. Choose a password to sign in:

${link}

The link works once, for seven days.`,
});

export const addedMessage = ({ displayName, shopName, link }: Invitation): Message => ({
  purpose: 'added',
  subject: `You now work with ${oneLine(shopName)} in Witness Mark`,
  text: `Hello ${displayName},

${shopName} has added you to its people. Sign in as before and choose the shop at the top:

${link}`,
});

export const resetMessage = ({ displayName, link }: Omit<Invitation, 'shopName'>): Message => ({
  purpose: 'reset',
  subject: 'Choose a new password for Witness Mark',
  text: `Hello ${displayName},

someone asked for a new password for this address. If it was you, choose one here:

${link}

The link works once, for one hour, and signs you out everywhere. If it was not you, do nothing: your password stays.`,
});

const oneLine = (text: string) => text.replace(/\s+/g, ' ');
