package section

// Read reads a document, strictly: unknown keys, wrong types, missing required keys, duplicate ids and non-finite numbers are
// problems, and all of them are returned at once with lines and keys. The document is nil if any problem is Refused. Older
// format versions are migrated first.
func Read(data []byte) (*Document, []Problem) { panic("section: Read is not built") }

// Write returns the document as YAML. Keys, order, style and comments of the file that it was read from are kept.
func Write(d *Document) ([]byte, error) { panic("section: Write is not built") }

// Open reads the file at path. A failure to read it (a directory, no permission, over MaxBytes, not text) comes as an error with one
// clear sentence; problems in what it says come as a list.
func Open(path string) (*Document, []Problem, error) { panic("section: Open is not built") }

// Save writes the document to path atomically (write aside, flush, rename), so that path holds the old or the new file, whole,
// whatever happens. An existing file keeps its mode; a link is followed.
func Save(path string, d *Document) error { panic("section: Save is not built") }
