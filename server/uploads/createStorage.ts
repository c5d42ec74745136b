import { createBucketStorage } from './bucketStorage';
import { createFolderStorage } from './folderStorage';
import type { FileStorage, StorageSettings } from './storage';

/** The store that the settings name. */
export const createStorage = ({ uploadsDir, bucket }: StorageSettings): FileStorage =>
  bucket ? createBucketStorage(uploadsDir, bucket) : createFolderStorage(uploadsDir);
