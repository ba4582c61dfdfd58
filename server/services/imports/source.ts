import type { z } from 'zod'
import { largestFile, type pasteContract } from '#shared/contracts/imports'
import type { UploadedFile } from '~~/server/utils/body'
import { sha256 } from '~~/server/utils/object-store'
import { ServiceError } from '../errors'

/** A table as it came. */
export interface Source extends UploadedFile {
  sha256: string
}

/** Tells a paste from a file, for which recognising the encoding is part of reading it. */
const pasteType = 'text/plain; charset=utf-8; from=paste'
export const isPaste = ({ mediaType }: Pick<Source, 'mediaType'>): boolean => mediaType === pasteType

/** The bytes of a file or paste. A name is a name: folders in it are left out. @throws ServiceError 'too-large' */
export function sourceOf(given: UploadedFile | z.infer<typeof pasteContract>): Source {
  if ('text' in given) {
    const bytes = new TextEncoder().encode(given.text)
    return { name: given.name, mediaType: pasteType, bytes, sha256: sha256(bytes) }
  }
  if (given.bytes.length > largestFile) {
    throw new ServiceError('too-large', `The file is larger than ${largestFile / 1_000_000} MB, the most one import takes. Leave out what is no reading, or cut it into several files.`)
  }
  return { ...given, name: given.name.split(/[\\/]/).at(-1)!.trim() || 'table', sha256: sha256(given.bytes) }
}
