#pragma once
// Asks for the city's files, one line a table, and for the project file to put them in.

#include <QDialog>
#include <QLineEdit>
#include <QPushButton>

#include <map>

#include "geo/imports/gathered.h"

class QGridLayout;

namespace unstring {

struct GatherWish {
    std::string project_path;
    GatherFiles files;
};

class GatherDialog : public QDialog {
    Q_OBJECT
public:
    /// @param project_path  given: the files go into this project; empty: it is asked for
    explicit GatherDialog(const QString& project_path, QWidget* parent = nullptr);
    [[nodiscard]] GatherWish wish() const;

private:
    QLineEdit* add_line(QGridLayout* grid, int row, const QString& name, const QString& what,
                        const QString& needed, const char* object);
    void check();

    QLineEdit* project_;
    std::map<std::string, QLineEdit*> lines_;
    QPushButton* read_ = nullptr;
};

} // namespace unstring
