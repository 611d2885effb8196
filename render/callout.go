package render

func (p *sectionPainter) callouts() {}
