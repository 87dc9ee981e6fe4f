"""Every drawing of the booklet, the Book pages and the desk, as SVG text."""
