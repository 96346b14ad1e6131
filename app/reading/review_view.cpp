// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/review_view.h"

#include "app/desk/theme.h"

#include <QHeaderView>
#include <QKeyEvent>
#include <QPainter>
#include <QStyledItemDelegate>

#include <algorithm>

namespace evenstroke {

namespace {

using namespace review_sizes;

constexpr int heading_top = 12, sentence_gap = 2, head_padding = 4;

QFont heading_font() { return type(TypeSize::body, true); }

int sentence_height(const ReviewSection& section, int width)
{
    if (section.sentence.empty())
        return 0;
    return sentence_gap
           + QFontMetrics(type(TypeSize::body))
                 .boundingRect(QRect(0, 0, std::max(80, width), 1000), Qt::TextWordWrap, to_qstring(section.sentence))
                 .height();
}

int heading_height(const ReviewSection& section, int width)
{
    return heading_top + row_height + sentence_height(section, width);
}

class RowDelegate : public QStyledItemDelegate
{
public:
    explicit RowDelegate(ReviewView& view) : QStyledItemDelegate(&view), view_(view) {}

    void paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const override
    {
        const ReviewRow* row = view_.review_model().row(index.row());
        if (!row)
            return;
        const Theme& t = theme();
        const bool in_hand = index.row() == view_.currentIndex().row();
        // Words may reach into the column of numbers of places: both have their ground painted at once.
        const QRect ground = index.column() == ReviewModel::words && row->line
                                 ? option.rect.adjusted(0, 0, view_.columns().width[ReviewModel::place], 0)
                                 : option.rect;
        const bool painted = index.column() == ReviewModel::place && row->line;
        if (in_hand && !painted)
            painter->fillRect(row->line ? ground : ground.adjusted(0, heading_top - 2, 0, 0), t.band);
        else if (option.state & QStyle::State_MouseOver && !painted)
            painter->fillRect(ground, t.sheet);
        if (!row->line) {
            if (index.column() == 0)
                paint_heading(*painter, option.rect, *row->section, t);
            return;
        }
        paint_cell(*painter, QRect(option.rect.left(), option.rect.top(), option.rect.width(), row_height), index, *row, t);
        paint_note(*painter, option.rect, index.row(), *row->line, t);
        if (in_hand && view_.hasFocus() && index.column() == 0)
            painter->fillRect(QRect(option.rect.left(), option.rect.top(), 2, option.rect.height()), t.line);
    }

private:
    void paint_heading(QPainter& painter, const QRect& area, const ReviewSection& section, const Theme& t) const
    {
        const QRect top(area.left() + 4, area.top() + heading_top, std::min(area.width(), view_.viewport()->width()) - 8, row_height);
        painter.setFont(heading_font());
        painter.setPen(t.ink);
        const QString title = to_qstring(section.title);
        painter.drawText(top, Qt::AlignLeft | Qt::AlignVCenter, title);
        if (has_mark(section.level)) {
            const int at = top.left() + QFontMetrics(heading_font()).horizontalAdvance(title) + 10;
            draw_mark(painter, QRectF(at, top.center().y() - mark_side / 2, mark_side, mark_side), section.level, t);
            painter.setFont(type(TypeSize::label));
            painter.setPen(t.level_colour(section.level));
            painter.drawText(top.adjusted(at - top.left() + mark_side + 5, 0, 0, 0), Qt::AlignLeft | Qt::AlignVCenter,
                             level_text(section.level));
        }
        if (!section.sentence.empty()) {
            painter.setFont(type(TypeSize::body));
            painter.setPen(has_mark(section.level) ? t.ink : t.muted);
            painter.drawText(QRect(top.left(), top.bottom() - 1, top.width(), area.bottom() - top.bottom()),
                             Qt::TextWordWrap | Qt::AlignTop, to_qstring(section.sentence));
        }
        if (view_.currentIndex().row() >= 0 && view_.review_model().row(view_.currentIndex().row())->section == &section
            && !view_.review_model().row(view_.currentIndex().row())->line && view_.hasFocus())
            painter.fillRect(QRect(area.left(), area.top() + heading_top - 2, 2, area.height() - heading_top + 2), t.line);
    }

    void paint_cell(QPainter& painter, const QRect& area, const QModelIndex& index, const ReviewRow& row, const Theme& t) const
    {
        const QString words = index.data().toString();
        switch (index.column()) {
        case ReviewModel::words: paint_words(painter, area, row, t); return;
        case ReviewModel::verdict:
            if (note_of(index.row()) == 0)
                paint_verdict(painter, with_free_room(area, *row.line), words, row.line->level, t);
            return;
        case ReviewModel::value:
        case ReviewModel::corrected:
        case ReviewModel::expected:
        case ReviewModel::deviation:
        case ReviewModel::from_usual: paint_number(painter, area, words, index.column(), row, t); return;
        default: break;
        }
        painter.setFont(type(TypeSize::label));
        painter.setPen(index.column() == ReviewModel::place ? t.ink : t.muted);
        painter.drawText(area.adjusted(4, 0, index.column() == ReviewModel::place ? -4 : 0, 0),
                         (index.column() == ReviewModel::place ? Qt::AlignRight : Qt::AlignLeft) | Qt::AlignVCenter, words);
    }

    int note_of(int row) const
    {
        const std::vector<int>& notes = view_.columns().note;
        return row < static_cast<int>(notes.size()) ? notes[static_cast<std::size_t>(row)] : 0;
    }

    /// A verdict without room in its row stands under it. Every cell draws its own part, as cells are painted one by one.
    void paint_note(QPainter& painter, const QRect& cell, int row, const ReviewLine& line, const Theme& t) const
    {
        if (note_of(row) == 0)
            return;
        const QString words = view_.review_model().index(row, ReviewModel::verdict).data().toString();
        const int top = cell.top() + view_.columns().height(row) - note_of(row) - 3;
        QRect room = note_room(view_.viewport()->width()).translated(view_.columnViewportPosition(0), top);
        painter.save();
        painter.setClipRect(cell);
        if (has_mark(line.level)) {
            draw_mark(painter, QRectF(room.left(), room.top() + 1, mark_side, mark_side), line.level, t);
            room.setLeft(room.left() + mark_side + 6);
        }
        painter.setFont(type(TypeSize::label));
        painter.setPen(has_mark(line.level) ? t.level_colour(line.level) : t.muted);
        painter.drawText(room, Qt::TextWordWrap | Qt::AlignLeft | Qt::AlignTop, words);
        painter.restore();
    }

    /// Where nothing is compared, the verdict has the room of the comparison.
    QRect with_free_room(const QRect& area, const ReviewLine& line) const
    {
        return area.adjusted(view_.columnViewportPosition(first_column_of_verdict(line)) -
                                 view_.columnViewportPosition(ReviewModel::verdict), 0, 0, 0);
    }

    void paint_words(QPainter& painter, const QRect& area, const ReviewRow& row, const Theme& t) const
    {
        if (row.repeats)
            return;
        const QRect room(area.left() + indent, area.top(), room_of_name(*row.line, view_.columns()), area.height());
        const int unit_width = width_of_unit(*row.line);
        painter.setFont(type(TypeSize::body));
        painter.setPen(t.ink);
        const QFontMetrics metrics(painter.font());
        const QStringList lines = name_lines(to_qstring(row.line->words), room.width() - unit_width);
        QRect last = room;
        for (const QString& line : lines) {
            last.moveTop(room.top() + static_cast<int>(&line - lines.data()) * name_line);
            painter.drawText(last, Qt::AlignLeft | Qt::AlignVCenter, line);
        }
        const QString& title = lines.back();
        painter.setFont(type(TypeSize::label));
        painter.setPen(t.muted);
        painter.drawText(last.adjusted(metrics.horizontalAdvance(title) + 6, 1, 0, 0), Qt::AlignLeft | Qt::AlignVCenter,
                         to_qstring(row.line->unit));
    }

    void paint_number(QPainter& painter, const QRect& area, const QString& words, int column, const ReviewRow& row, const Theme& t) const
    {
        const bool tells = has_mark(row.line->level) &&
                           column == (row.line->from_usual ? ReviewModel::from_usual : ReviewModel::deviation);
        painter.setFont(type(TypeSize::body, tells));
        painter.setPen(column == ReviewModel::value || column == ReviewModel::deviation || tells ? t.ink : t.muted);
        painter.drawText(area.adjusted(0, 0, -head_padding, 0), Qt::AlignRight | Qt::AlignVCenter, words);
    }

    void paint_verdict(QPainter& painter, const QRect& area, const QString& words, Level level, const Theme& t) const
    {
        QRect room = area.adjusted(4, 0, -4, 0);
        if (has_mark(level)) {
            draw_mark(painter, QRectF(room.left(), room.center().y() - mark_side / 2, mark_side, mark_side), level, t);
            room.setLeft(room.left() + mark_side + 6);
        }
        painter.setFont(type(TypeSize::label));
        painter.setPen(has_mark(level) ? t.level_colour(level) : t.muted);
        painter.drawText(room, Qt::AlignLeft | Qt::AlignVCenter,
                         QFontMetrics(painter.font()).elidedText(words, Qt::ElideRight, room.width()));
    }

    ReviewView& view_;
};

} // namespace

ReviewView::ReviewView(QWidget* parent) : QTableView(parent)
{
    setItemDelegate(new RowDelegate(*this));
    setModel(&model_);
    verticalHeader()->hide();
    verticalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    verticalHeader()->setMinimumSectionSize(10);
    horizontalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    horizontalHeader()->setMinimumSectionSize(10);
    horizontalHeader()->setSectionsClickable(false);
    horizontalHeader()->setHighlightSections(false);
    horizontalHeader()->setStyleSheet(QStringLiteral("QHeaderView::section { padding: 4px 4px; }"));
    setShowGrid(false);
    setWordWrap(false);
    setFrameShape(QFrame::NoFrame);
    setEditTriggers(NoEditTriggers);
    setSelectionMode(NoSelection); // the row in hand is drawn by the delegate
    setTabKeyNavigation(false);
    setMouseTracking(true);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setVerticalScrollMode(ScrollPerPixel);
    setAccessibleName(tr("The reading judged from top to bottom"));
    connect(this, &QTableView::doubleClicked, this, [this] { emit trend_asked(); });
}

void ReviewView::show_review(std::shared_ptr<const ReadingReview> review, std::shared_ptr<const Judgement> judgement,
                             std::vector<storage::Correction> corrections)
{
    filling_ = true;
    // The row in hand stays the same quantity at the same place; the old review is alive until the model has let go.
    const ReviewRow was = row_in_hand() ? *row_in_hand() : ReviewRow{};
    const ReviewLine line_was = was.line ? *was.line : ReviewLine{};
    ReviewSection section_was;
    if (was.section)
        section_was.topic = was.section->topic;
    model_.show_review(std::move(review), std::move(judgement), std::move(corrections));
    clearSpans();
    for (int row = 0; row < model_.rowCount(); ++row)
        if (!model_.row(row)->line)
            setSpan(row, 0, 1, ReviewModel::column_count);
    set_sizes();
    if (model_.rowCount() > 0)
        setCurrentIndex(model_.index(model_.row_like({was.section ? &section_was : nullptr, was.line ? &line_was : nullptr, false}), 0));
    filling_ = false;
}

void ReviewView::go_to(int row)
{
    if (row >= 0 && row != currentIndex().row())
        setCurrentIndex(model_.index(row, 0));
    scrollTo(model_.index(std::max(0, row), 0));
}

void ReviewView::set_sizes()
{
    columns_ = measure_columns(model_, viewport()->width());
    for (int column = 0; column < ReviewModel::column_count; ++column) {
        const int wide = columns_.width[static_cast<std::size_t>(column)];
        setColumnHidden(column, wide == 0);
        if (wide > 0)
            setColumnWidth(column, wide);
    }
    for (int row = 0; row < model_.rowCount(); ++row)
        setRowHeight(row, model_.row(row)->line ? columns_.height(row)
                                                : heading_height(*model_.row(row)->section, viewport()->width() - 8));
}

void ReviewView::keyPressEvent(QKeyEvent* event)
{
    switch (event->key()) {
    case Qt::Key_Return:
    case Qt::Key_Enter: emit trend_asked(); return;
    case Qt::Key_Space: emit workings_asked(); return;
    case Qt::Key_Up:
    case Qt::Key_Down:
    case Qt::Key_Home:
    case Qt::Key_End: {
        const int last = model_.rowCount() - 1, here = currentIndex().row();
        go_to(event->key() == Qt::Key_Home  ? 0
              : event->key() == Qt::Key_End ? last
                                            : std::clamp(here + (event->key() == Qt::Key_Up ? -1 : 1), 0, std::max(0, last)));
        return;
    }
    default: event->ignore(); // the page's keys
    }
}

void ReviewView::resizeEvent(QResizeEvent* event)
{
    QTableView::resizeEvent(event);
    set_sizes();
}

void ReviewView::currentChanged(const QModelIndex& current, const QModelIndex& previous)
{
    QTableView::currentChanged(current, previous);
    viewport()->update(); // a whole row is in hand, not a cell
    if (!filling_ && current.isValid() && current.row() != previous.row())
        emit row_chosen();
}

void ReviewView::changeEvent(QEvent* event)
{
    QTableView::changeEvent(event);
    if (event->type() == QEvent::FontChange)
        set_sizes();
}

} // namespace evenstroke
