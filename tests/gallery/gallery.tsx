import { render } from 'preact';
import '../../renderer/style/index.css';
import './gallery.css';
import { GalleryBench } from './GalleryBench.js';
import { GalleryDialog } from './GalleryDialog.js';

// ?theme=light &dialog=keys &state=empty choose what is shown.
const query = new URLSearchParams(location.search);
document.documentElement.dataset.theme = query.get('theme') ?? 'dark';

const root = document.getElementById('gallery');
if (root !== null) {
  render(
    <>
      <GalleryBench state={query.get('state') ?? 'full'} />
      <GalleryDialog name={query.get('dialog') ?? ''} />
    </>,
    root,
  );
}
