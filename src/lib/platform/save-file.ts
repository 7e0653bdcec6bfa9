import { Platform, Share } from 'react-native';

/** Hands a text file to the person: as a download in a browser, through the share sheet elsewhere. */
export async function saveTextFile(name: string, text: string, type = 'application/json'): Promise<void> {
  if (Platform.OS !== 'web') {
    await Share.share({ title: name, message: text });
    return;
  }
  const address = URL.createObjectURL(new Blob([text], { type }));
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  // The browser has taken its copy by the next turn.
  setTimeout(() => URL.revokeObjectURL(address), 0);
}
