import { REGION, UPLOAD } from './parameters';
import { answers, json, listOf, PROBLEM, reference } from './parts';

const FILES = {
  required: true,
  content: {
    'multipart/form-data': {
      schema: {
        type: 'object',
        properties: { files: { type: 'array', items: { type: 'string', format: 'binary' } } },
        required: ['files'],
      },
    },
  },
};

/** Files that are looked at before they are imported. */
export const UPLOAD_PATHS = {
  '/api/regions/{region}/uploads': {
    parameters: [REGION],
    get: { summary: 'Uploads that wait for their import', responses: answers('oldest first', json(listOf('Upload'))) },
    post: {
      summary: 'Send files to be looked at before they are imported; archives are unpacked',
      requestBody: FILES,
      responses: answers('the upload', json(reference('Upload')), '201'),
    },
  },
  '/api/uploads': {
    post: {
      summary: 'Send files for a region that their import will make',
      requestBody: FILES,
      responses: answers('the upload', json(reference('Upload')), '201'),
    },
  },
  '/api/uploads/{upload}': {
    parameters: [UPLOAD],
    get: { summary: 'An upload that waits', responses: answers('the upload', json(reference('Upload'))) },
    patch: {
      summary: 'Say how some of its files are to be read, looking at them anew, and which stay out of the import',
      requestBody: { required: true, content: json(reference('UploadChange')) },
      responses: answers('these files in short', json(listOf('UploadedFile'))),
    },
    delete: { summary: 'Give an upload up', responses: { '204': { description: 'its files are gone' }, ...PROBLEM } },
  },
  '/api/uploads/{upload}/files': {
    post: {
      summary: 'Add files to an upload',
      parameters: [UPLOAD],
      requestBody: FILES,
      responses: answers('the upload', json(reference('Upload'))),
    },
  },
  '/api/uploads/{upload}/preview': {
    post: {
      summary: 'Look at one of its files under other choices, which are kept',
      parameters: [UPLOAD],
      requestBody: { required: true, content: json(reference('PreviewOrder')) },
      responses: answers('the file as it is understood', json(reference('FilePreview'))),
    },
  },
  '/api/uploads/{upload}/import': {
    post: {
      summary: 'Import its files, or try it',
      parameters: [UPLOAD],
      requestBody: { required: true, content: json(reference('ImportOrder')) },
      responses: answers('the job that imports them', json(reference('Job')), '202'),
    },
  },
};
